import type { ChartView } from '@mereward/shared/charts/contract';
import { Select } from '@/components/select';

type Props = { pegs: ChartView['pegs']; pegId: string | null; onPeg: (pegId: string) => void };

/** Choosing a peg by its number, for whoever doesn't touch the chart. */
export function PegChoice({ pegs, pegId, onPeg }: Props) {
  return (
    <Select
      label="Peg"
      choices={pegs.map(({ id, number, name }) => ({ key: id, label: name ? `${number}, ${name}` : number }))}
      value={pegId}
      onChange={onPeg}
      unset="Choose a peg"
    />
  );
}
