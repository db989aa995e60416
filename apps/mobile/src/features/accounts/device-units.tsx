import { ChoiceGrid } from '@/components/choice-grid';
import { SticksField } from '@/features/accounts/sticks-field';
import { lengthChoices } from '@/features/accounts/stick-choices';
import { unitsChoice } from '@/hooks/use-units';

/** A stranger's units, kept on this device at once. */
export function DeviceUnits() {
  const units = unitsChoice.use();
  return (
    <>
      <ChoiceGrid
        label="Lengths in"
        choices={lengthChoices}
        value={units.length}
        onChange={(length) => unitsChoice.set({ ...units, length })}
        columns={2}
        bank={false}
      />
      <SticksField
        spacingM={units.stickSpacingM}
        onChange={(stickSpacingM) => unitsChoice.set({ ...units, stickSpacingM })}
      />
    </>
  );
}
