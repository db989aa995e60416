import type { Role } from '@mereward/shared/accounts/contract';
import { useFisheries } from '@/features/fisheries/api';
import { useSession } from '@/lib/session';

/** Those who keep a fishery's lakes, pegs and tickets from the office. */
export const OFFICE_ROLES = ['owner', 'manager', 'office'] as const satisfies readonly Role[];

/** The fisheries where the reader holds one of the roles. */
export function useMyFisheries(roles: readonly Role[]) {
  const { rolesAt } = useSession();
  const all = useFisheries();
  const mine = (all.data?.fisheries ?? []).filter(({ id }) =>
    rolesAt(id).some((role) => roles.includes(role)),
  );
  return { all, mine };
}
