import type { Role } from '@mereward/shared/accounts/contract';

/** Who drafts rules, who puts them in force, who may be the witness of a reading on the bank. */
export const RULE_WRITERS = ['manager', 'office'] as const satisfies readonly Role[];
export const RULE_PUBLISHERS = ['owner', 'manager'] as const satisfies readonly Role[];
export const DRAFT_READERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];
export const READING_WITNESSES = [
  'bailiff',
  'head_bailiff',
  'office',
  'manager',
] as const satisfies readonly Role[];
