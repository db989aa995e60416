import type { Role } from '@mereward/shared/accounts/contract';

export const NOTICE_WRITERS = [
  'owner',
  'manager',
  'head_bailiff',
  'office',
] as const satisfies readonly Role[];
