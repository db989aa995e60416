import { Role } from '@mereward/shared/accounts/contract';
import { Audience } from '@mereward/shared/lakes/contract';
import { describe, expect, test } from 'vitest';
import { maySeeLayer, whyNotLayer } from './audience';

/** Which audiences each sort of reader sees, without and with a running ticket: P public, T ticket, M members, S staff. */
const seen: Record<Role | 'nobody', [without: string, withTicket: string]> = {
  nobody: ['P', 'PT'],
  angler: ['P', 'PT'],
  member: ['PM', 'PTM'],
  office: ['PTMS', 'PTMS'],
  bailiff: ['PTMS', 'PTMS'],
  head_bailiff: ['PTMS', 'PTMS'],
  manager: ['PTMS', 'PTMS'],
  owner: ['PTMS', 'PTMS'],
};
const letter: Record<Audience, string> = { public: 'P', ticket: 'T', members: 'M', staff: 'S' };

const cases = [...Role.options, 'nobody' as const].flatMap((role) =>
  [false, true].flatMap((ticketRunning) =>
    Audience.options.map((audience) => ({ role, ticketRunning, audience })),
  ),
);

describe('a layer', () => {
  test('has sixty-four sorts of reader here', () => {
    expect(cases).toHaveLength(64);
  });

  test.each(cases)('for $audience, read by $role with a ticket running: $ticketRunning', (each) => {
    const { role, ticketRunning, audience } = each;
    const roles = new Set(role === 'nobody' ? [] : [role]);
    const wanted = seen[role][ticketRunning ? 1 : 0].includes(letter[audience]);
    expect(maySeeLayer({ audience, roles, ticketRunning })).toBe(wanted);
    expect(whyNotLayer({ audience, roles, ticketRunning }) === null).toBe(wanted);
  });

  test('read with two roles shows what either shows', () => {
    const roles = new Set<Role>(['member', 'bailiff']);
    expect(maySeeLayer({ audience: 'staff', roles, ticketRunning: false })).toBe(true);
  });

  test('says for whom it is', () => {
    const words = (audience: Audience) => whyNotLayer({ audience, roles: new Set(), ticketRunning: false });
    expect(words('ticket')).toBe('Shown to anglers with a ticket for this peg, while it runs.');
    expect(words('members')).toMatch(/members/);
    expect(words('staff')).toMatch(/staff/);
  });
});
