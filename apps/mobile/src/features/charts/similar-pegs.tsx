import type { SimilarPeg } from '@mereward/shared/charts/chart-answers';
import { Loaded } from '@/components/loaded';
import { List, Row } from '@/components/list';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { useUnits } from '@/hooks/use-units';
import { length, percent } from '@/lib/format';
import { useSimilarPegs } from './chart-answers-api';
import { PEG_STATUS } from './peg-words';
import { sentences } from './sentences';

/** Pegs most like this one, with what is alike and what differs: where to go when this one is taken. */
export function SimilarPegs({ pegId }: { pegId: string }) {
  const similar = useSimilarPegs(pegId);
  const units = useUnits();
  return (
    <Loaded query={similar} waiting="Looking at the other pegs…">
      {({ pegs, compared }) =>
        pegs.length === 0 ? (
          <Text tone="inkSoft">There is no other peg to compare with.</Text>
        ) : (
          <>
            <Text size="small" tone="inkSoft">
              {compared}
            </Text>
            <List label="Pegs like this one">
              {pegs.map((peg) => (
                <Row
                  key={peg.pegId}
                  title={titleOf(peg)}
                  note={noteOf(peg, (m) => length(m, units, 0))}
                  href={`/water/pegs/${peg.pegId}`}
                  end={
                    peg.status === 'open' ? undefined : (
                      <StatusShape {...PEG_STATUS[peg.status]} size="small" />
                    )
                  }
                />
              ))}
            </List>
          </>
        )
      }
    </Loaded>
  );
}

const titleOf = ({ number, name, sameLake, lakeName }: SimilarPeg): string =>
  [`Peg ${number}`, name, sameLake ? '' : lakeName].filter(Boolean).join(', ');

function noteOf({ likeness, distanceM, sameLake, alike, differs }: SimilarPeg, words: (m: number) => string) {
  const away = sameLake ? `, ${words(distanceM)} away` : '';
  const other = differs.length ? ` But: ${sentences(differs)}` : '';
  return `${percent(likeness)} alike${away}. ${sentences(alike)}${other}`;
}
