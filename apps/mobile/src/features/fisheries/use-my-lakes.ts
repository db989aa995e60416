import type { Role } from '@mereward/shared/accounts/contract';
import { useFisheries } from '@/features/fisheries/api';
import { useSession } from '@/lib/session';

/** The lakes of the fisheries where the reader holds one of the roles, with the fishery's name. */
export function useMyLakes(roles: readonly Role[]) {
  const { rolesAt } = useSession();
  const fisheries = useFisheries();
  const mine = (fisheries.data?.fisheries ?? []).filter(({ id }) =>
    rolesAt(id).some((role) => roles.includes(role)),
  );
  return {
    fisheries,
    lakes: mine.flatMap(({ id, name, lakes }) =>
      lakes.map((lake) => ({ ...lake, fisheryId: id, fisheryName: name })),
    ),
  };
}
