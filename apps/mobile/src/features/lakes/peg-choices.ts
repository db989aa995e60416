import type { PegDetails } from '@mereward/shared/lakes/contract';
import type { Choice } from '@/components/choice-props';

export const STATUSES: readonly Choice<PegDetails['status']>[] = [
  { key: 'open', label: 'Open' },
  { key: 'limited', label: 'Limited', note: 'with a reason' },
  { key: 'closed', label: 'Closed', note: 'with a reason' },
];

export const ORIGIN_FIXES: readonly Choice<PegDetails['originFixedBy']>[] = [
  { key: 'gnss', label: 'Survey receiver' },
  { key: 'phone_gnss', label: 'Phone' },
  { key: 'tape_or_plan', label: 'Tape or plan' },
  { key: 'estimated', label: 'By eye' },
];

export const PLATFORMS: readonly Choice<PegDetails['platform']['kind']>[] = [
  { key: 'none', label: 'None' },
  { key: 'bank', label: 'Cut bank' },
  { key: 'timber', label: 'Timber' },
  { key: 'stone', label: 'Stone' },
];

export const BARROW: readonly Choice<PegDetails['access']['barrow']>[] = [
  { key: 'yes', label: 'Yes' },
  { key: 'no', label: 'No' },
  { key: 'unknown', label: 'Not known' },
];

export const STEP_FREE: readonly Choice<PegDetails['stepFree']['kind']>[] = [
  { key: 'measured_suitable', label: 'Measured, suitable' },
  { key: 'assisted', label: 'With a helper' },
  { key: 'not_suitable', label: 'Not suitable' },
  { key: 'unknown', label: 'Not looked at' },
];

export const LINE_KINDS: readonly Choice<PegDetails['overheadLine']['kind']>[] = [
  { key: 'none', label: 'None', note: 'looked for, and none' },
  { key: 'present', label: 'There is one' },
  { key: 'unknown', label: 'Not looked for' },
];

export const LINE_FISHING: readonly Choice<PegDetails['overheadLine']['fishing']>[] = [
  { key: 'ok', label: 'Fishing', note: '30 m away or more' },
  { key: 'restricted', label: 'Restricted', note: 'ask first' },
  { key: 'no_fishing', label: 'No fishing' },
];
