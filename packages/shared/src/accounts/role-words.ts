import type { Role } from './contract';

/** Each role in the words a reader knows it by. */
export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  owner: 'owner',
  manager: 'manager',
  head_bailiff: 'head bailiff',
  bailiff: 'bailiff',
  office: 'office',
  member: 'member',
  angler: 'angler',
};
