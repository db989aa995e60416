import {
  NoticeDetails,
  NoticeSeverity,
  type NoticeView,
  type WriteNotice,
} from '@mereward/shared/notices/contract';
import { z } from 'zod';
import { civilTime, instantOf } from '@/lib/zoned-time';

/** A notice as it is typed; times by the fishery's clock, an empty end for "until taken down". */
export const NoticeDraft = z.object({
  title: z.string().trim().min(1, 'Give it a title').max(120),
  text: z.string().trim().min(1, 'Say what it is').max(500, 'At most 500 letters'),
  severity: NoticeSeverity,
  audience: NoticeDetails.shape.audience,
  lakeIds: z.array(z.string()),
  from: z.string().min(1, 'Choose the day and the time'),
  until: z.string(),
});
export type NoticeDraft = z.infer<typeof NoticeDraft>;

export const freshNotice = (zone: string, nowMs: number): NoticeDraft => ({
  title: '',
  text: '',
  severity: 'info',
  audience: 'public',
  lakeIds: [],
  from: civilTime(nowMs, zone),
  until: '',
});

export const draftOfNotice = (
  { details, severity, lakeIds, from, until }: NoticeView,
  zone: string,
): NoticeDraft => ({
  title: details.title,
  text: details.text,
  audience: details.audience,
  severity,
  lakeIds,
  from: civilTime(Date.parse(from), zone),
  until: until === null ? '' : civilTime(Date.parse(until), zone),
});

export function noticeOf(id: string, draft: NoticeDraft, zone: string): WriteNotice {
  const { title, text, audience, severity, lakeIds } = draft;
  return {
    id,
    lakeIds,
    severity,
    from: instantOf(draft.from, zone) ?? draft.from,
    until: draft.until === '' ? null : (instantOf(draft.until, zone) ?? draft.until),
    details: { title, text, audience },
  };
}
