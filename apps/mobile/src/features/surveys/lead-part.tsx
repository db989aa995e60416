import { useFormContext, useWatch } from 'react-hook-form';
import { FormSelect } from '@/components/form-controls';
import { Text } from '@/components/text';
import { useLake } from '@/features/lakes/api';
import { useLeads } from '@/features/surveys/bottom-api';
import type { HoldsKit } from '@/features/surveys/kit-part';
import { rateWords } from '@/features/surveys/lead-words';

const NONE = { key: '', label: 'None: a count stays a count' } as const;

/** Which calibrated lead the kit throws. Only leads of its very weight, shape and line are offered. */
export function LeadPart({ lakeId }: { lakeId: string }) {
  const { control } = useFormContext<HoldsKit>();
  const lake = useLake(lakeId);
  const { data } = useLeads(lake.data?.fisheryId ?? '');
  const kit = useWatch({ control, name: 'kit' });
  const fitting = (data?.leads ?? []).filter(
    ({ id, putAway, leadG, leadShape, lineType }) =>
      (!putAway || id === kit.leadId) &&
      String(leadG) === kit.leadG.trim() &&
      leadShape === kit.leadShape &&
      lineType === kit.lineType,
  );
  const choices = fitting.map(({ id, name, calibration }) => ({
    key: id,
    label: `${name}: ${rateWords(calibration)}`,
  }));
  const wrong = kit.leadId !== '' && !fitting.some(({ id }) => id === kit.leadId);
  return (
    <>
      <FormSelect
        control={control}
        name="kit.leadId"
        label="Calibrated lead"
        hint="Its counted falls become depths, no better than grade C. Leads of this weight, shape and line are offered."
        choices={[NONE, ...choices]}
        bank
      />
      {wrong && data ? (
        <Text tone="amber" weight="semibold">
          The lead chosen before has another weight, shape or line. Choose again.
        </Text>
      ) : null}
    </>
  );
}
