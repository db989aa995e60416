import type { DisagreementView } from '@mereward/shared/charts/disagreement';
import { dayWords } from '@mereward/shared/time/civil-day';
import { List, Row } from '@/components/list';
import { StatusShape } from '@/components/status-shape';
import { useUnits } from '@/hooks/use-units';
import { becameWords, foundWords, STATUS_LOOKS } from './disagreement-words';

type Props = { label: string; disagreements: readonly DisagreementView[]; withPeg?: boolean };

/** One's own reports, each with what became of it. */
export function MyDisagreements({ label, disagreements, withPeg = false }: Props) {
  const units = useUnits();
  return (
    <List label={label}>
      {disagreements.map((each) => (
        <Row
          key={each.id}
          title={`${withPeg ? `Peg ${each.pegNumber}: ` : ''}${foundWords(each.found, units)}`}
          note={`${dayWords(each.day)}, ${each.placeWords}. ${becameWords(each)}`}
          end={<StatusShape {...STATUS_LOOKS[each.status]} size="small" />}
          {...(withPeg ? { href: `/water/pegs/${each.pegId}` as const } : {})}
        />
      ))}
    </List>
  );
}
