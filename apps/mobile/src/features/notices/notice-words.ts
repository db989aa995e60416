import type { NoticeDetails, NoticeSeverity } from '@mereward/shared/notices/contract';
import type { NoteKind } from '@/components/note';

export const SEVERITY_KINDS: Readonly<Record<NoticeSeverity, NoteKind>> = {
  info: 'plain',
  caution: 'caution',
  danger: 'danger',
  closed: 'danger',
};

export const SEVERITY_WORDS: Readonly<Record<NoticeSeverity, string>> = {
  info: 'To know',
  caution: 'Caution',
  danger: 'Danger',
  closed: 'Closed',
};

export const AUDIENCE_WORDS: Readonly<Record<NoticeDetails['audience'], string>> = {
  public: 'Everybody',
  ticket: 'Ticket holders',
  members: 'Members',
  staff: 'Staff',
};

/** Danger and closed can't be put away while they hold. */
export const mayPutAway = (severity: NoticeSeverity): boolean =>
  severity === 'info' || severity === 'caution';
