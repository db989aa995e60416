import type { Role } from '@mereward/shared/accounts/contract';

/** Who closes water and lifts a closure; who may lift one although something still stands against it. */
export const CLOSERS = ['owner', 'manager', 'head_bailiff', 'office'] as const satisfies readonly Role[];
export const OVERRIDERS = ['owner'] as const satisfies readonly Role[];
