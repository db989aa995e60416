import type { FreePegs } from '@mereward/shared/bookings/availability-contract';
import { Substrate } from '@mereward/shared/surveys/contract';
import { Button } from '@/components/button';
import { Checkbox } from '@/components/checkbox';
import { Select } from '@/components/select';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { NO_FILTERS, type PegFilters } from '@/features/bookings/find-choice';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';

const ANY = 'any';
const DEPTHS_M = [1, 1.5, 2, 2.5, 3, 4, 5] as const;
const WALKS_M = [50, 100, 200, 400] as const;

type Props = {
  open: boolean;
  onClose: () => void;
  lakes: FreePegs['lakes'];
  filters: PegFilters;
  onChange: (filters: PegFilters) => void;
};

/** Which pegs are wanted. What is not known of a peg leaves it out while a filter asks for it. */
export function FilterSheet({ open, onClose, lakes, filters, onChange }: Props) {
  const units = useUnits();
  const set = (change: Partial<PegFilters>): void => onChange({ ...filters, ...change });
  const depths = DEPTHS_M.map((depthM) => ({ key: String(depthM), label: length(depthM, units) }));
  const chosen = (value: string | number | null): string => (value === null ? ANY : String(value));
  const number = (key: string): number | null => (key === ANY ? null : Number(key));
  return (
    <Sheet open={open} onClose={onClose} title="Which pegs">
      {lakes.length > 1 || filters.lakeId !== null ? (
        <Select
          label="Lake"
          choices={[
            { key: ANY, label: 'Any lake' },
            ...lakes.map(({ id, name }) => ({ key: id, label: name })),
          ]}
          value={chosen(filters.lakeId)}
          onChange={(key) => set({ lakeId: key === ANY ? null : key })}
        />
      ) : null}
      <Select
        label="Bottom somewhere in its water"
        choices={[
          { key: ANY, label: 'Any bottom' },
          ...Substrate.options.map((key) => ({ key, label: key })),
        ]}
        value={chosen(filters.bottom)}
        onChange={(key) => set({ bottom: Substrate.safeParse(key).data ?? null })}
      />
      <Select
        label="Somewhere at least so deep"
        choices={[{ key: ANY, label: 'Any depth' }, ...depths]}
        value={chosen(filters.leastDepthM)}
        onChange={(key) => set({ leastDepthM: number(key) })}
      />
      <Select
        label="Nowhere deeper than"
        choices={[{ key: ANY, label: 'Any depth' }, ...depths]}
        value={chosen(filters.mostDepthM)}
        onChange={(key) => set({ mostDepthM: number(key) })}
      />
      <Select
        label="At most so far from the car"
        choices={[
          { key: ANY, label: 'Any distance' },
          ...WALKS_M.map((metres) => ({ key: String(metres), label: `${String(metres)} m` })),
        ]}
        value={chosen(filters.fromParkingM)}
        onChange={(key) => set({ fromParkingM: number(key) })}
      />
      <Checkbox label="A barrow gets there" checked={filters.barrow} onChange={(barrow) => set({ barrow })} />
      <Checkbox
        label="Step-free, measured there, or with help"
        checked={filters.stepFree}
        onChange={(stepFree) => set({ stepFree })}
      />
      <Text size="small" tone="inkSoft">
        A peg of which a thing is not known, or not shown to you, is left out by a filter on it.
      </Text>
      <Button label="Show the pegs" kind="main" onPress={onClose} />
      <Button label="Take the filters away" kind="quiet" onPress={() => onChange(NO_FILTERS)} />
    </Sheet>
  );
}
