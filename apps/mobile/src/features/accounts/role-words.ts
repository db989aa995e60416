import type { Role } from '@mereward/shared/accounts/contract';

const words: Readonly<Record<Role, string>> = {
  owner: 'owner',
  manager: 'manager',
  head_bailiff: 'head bailiff',
  bailiff: 'bailiff',
  office: 'office',
  member: 'member',
  angler: 'angler',
};

export const roleWord = (role: Role): string => words[role];
