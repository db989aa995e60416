import { Units } from '@mereward/shared/accounts/contract';
import { USUAL_UNITS } from '@/constants/units';
import { createPreference } from '@/lib/preference';
import { useSession } from '@/lib/session';

/** A stranger's choice of units, kept on this device. Somebody signed in takes theirs along. */
export const unitsChoice = createPreference<Units>({
  key: 'mereward.units',
  schema: Units,
  fallback: USUAL_UNITS,
});

/** How this reader likes lengths, and the spacing of their own distance sticks. */
export function useUnits(): Units {
  const here = unitsChoice.use();
  const { account } = useSession();
  return account?.units ?? here;
}
