import type { Role } from '@mereward/shared/accounts/contract';
import { demoId } from './random';

/** Every demo sign-in has this password; it opens nothing but the demo. */
export const DEMO_PASSWORD = 'heron by the sluice';

export type DemoPerson = { id: string; email: string; name: string; roles: Role[]; can: string };

const person = (name: string, roles: Role[], can: string): DemoPerson => {
  const email = `${name.split(' ')[0]!.toLowerCase()}@ostlemere.example`;
  return { id: demoId(`person ${email}`), email, name, roles, can };
};

/** The invented people of Ostlemere Waters. */
export const MARIAN = person(
  'Marian Thorley',
  ['owner'],
  'owner: lakes, pegs, people, audiences, approves charts',
);
export const IDRIS = person(
  'Idris Penhale',
  ['manager'],
  'manager: the same, and approves what Joan and Tom surveyed',
);
export const JOAN = person(
  'Joan Askew',
  ['head_bailiff'],
  'head bailiff: surveys, builds charts, keeps spots and pegs',
);
export const TOM = person('Tom Wragg', ['bailiff'], 'bailiff: surveys, records levels');
export const BEA = person('Bea Lund', ['bailiff'], 'bailiff');
export const PRIYA = person('Priya Nandakumar', ['office'], 'office: writes tickets');
export const COLIN = person('Colin Frayne', ['member'], 'member: reads what members may');
export const SOFIA = person('Sofia Marsh', ['angler'], 'day angler: holds a ticket for peg FO7 today');

export const DEMO_PEOPLE: readonly DemoPerson[] = [MARIAN, IDRIS, JOAN, TOM, BEA, PRIYA, COLIN, SOFIA];
