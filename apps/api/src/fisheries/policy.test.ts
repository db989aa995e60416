import { Role } from '@mereward/shared/accounts/contract';
import { describe, expect, test } from 'vitest';
import { STRANGER, type Actor } from '../ctx';
import {
  givableRoles,
  isOneOfThem,
  mayChangeFishery,
  mayReadFeels,
  maySeeGateCode,
  maySeePeople,
} from './policy';

const holder = (...roles: Role[]): Actor => ({
  kind: 'account',
  id: 'a',
  roles: new Map([['here', new Set(roles)]]),
});

const those = (may: (actor: Actor, fisheryId: string) => boolean): Role[] =>
  Role.options.filter((role) => may(holder(role), 'here'));

describe('at a fishery', () => {
  test('each power is held by the roles it belongs to', () => {
    expect(those(mayChangeFishery)).toEqual(['owner', 'manager']);
    expect(those(maySeePeople)).toEqual(['owner', 'manager', 'office']);
    expect(those(maySeeGateCode)).toEqual(['owner', 'manager', 'head_bailiff', 'bailiff', 'office']);
    expect(those(mayReadFeels)).toEqual(['owner', 'manager', 'head_bailiff']);
    expect(those(isOneOfThem)).toEqual(Role.options);
  });

  test('nobody gives a role above their own', () => {
    expect(givableRoles(holder('owner'), 'here')).toEqual(Role.options);
    expect(givableRoles(holder('manager'), 'here')).not.toContain('manager');
    expect(givableRoles(holder('manager'), 'here')).not.toContain('owner');
    expect(givableRoles(holder('office'), 'here')).toEqual(['member', 'angler']);
    expect(givableRoles(holder('office', 'bailiff', 'member'), 'here')).toEqual(['member', 'angler']);
    for (const role of ['head_bailiff', 'bailiff', 'member', 'angler'] as const)
      expect(givableRoles(holder(role), 'here')).toEqual([]);
  });

  test.each([mayChangeFishery, mayReadFeels, maySeePeople, maySeeGateCode, isOneOfThem])(
    'roles held elsewhere, or by nobody, give nothing',
    (may) => {
      expect(may(holder('owner'), 'elsewhere')).toBe(false);
      expect(may(STRANGER, 'here')).toBe(false);
    },
  );
});
