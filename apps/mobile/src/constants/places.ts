import type { Role } from '@mereward/shared/accounts/contract';

export type Place = {
  key: 'water' | 'tickets' | 'bank' | 'office' | 'me';
  label: string;
  href: `/${string}`;
  /** First steps of the addresses that lie in it. */
  holds: readonly string[];
};

const everywhere: readonly Role[] = [
  'owner',
  'manager',
  'head_bailiff',
  'bailiff',
  'office',
  'member',
  'angler',
];
const bankRoles: readonly Role[] = ['owner', 'manager', 'head_bailiff', 'bailiff'];
const officeRoles: readonly Role[] = ['owner', 'manager', 'head_bailiff', 'office']; // a head bailiff drafts charts

const places: readonly (Place & { for: readonly Role[]; strangers: boolean })[] = [
  { key: 'water', label: 'Water', href: '/water', holds: ['water'], for: everywhere, strangers: true },
  {
    key: 'tickets',
    label: 'Tickets',
    href: '/tickets',
    holds: ['tickets', 't', 'choose'],
    for: everywhere,
    strangers: true,
  },
  { key: 'bank', label: 'Bank', href: '/bank', holds: ['bank', 'waiting'], for: bankRoles, strangers: false },
  { key: 'office', label: 'Office', href: '/office', holds: ['office'], for: officeRoles, strangers: false },
  {
    key: 'me',
    label: 'Me',
    href: '/me',
    holds: ['me', 'sign-in', 'sign-up', 'verify', 'forgotten', 'reset-password', 'invitation'],
    for: everywhere,
    strangers: true,
  },
];

/** The places open to somebody holding these roles. A courtesy: the API decides what they may do there. */
export const placesFor = (roles: readonly Role[]): readonly Place[] =>
  places.filter((place) => place.strangers || place.for.some((role) => roles.includes(role)));
