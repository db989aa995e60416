import { useState } from 'react';
import type { NextCast } from '@mereward/shared/charts/chart-answers';
import { aimWords } from '@mereward/shared/charts/spot-figures';
import { countWords } from '@mereward/shared/charts/spot-words';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { FoldedPart } from '@/features/surveys/cast-part';
import type { SuggestTerms } from '@/features/surveys/cast-suggestion';
import { percent } from '@/lib/format';
import { castsAhead } from './casts-ahead';
import { useNextCasts } from './chart-answers-api';

/** "Where to cast next" for the peg one stands on: one tap fills aim and wraps. Nothing where the chart says nothing. */
export function NextCastsPart({ lake, pegId, made, onTake }: SuggestTerms) {
  const answer = useNextCasts(lake.publishedChart?.id ?? null);
  const [open, setOpen] = useState(false);
  if (!lake.publishedChart || pegId === '' || answer.isPending || answer.error) return null;
  const casts = castsAhead(answer.data, pegId, made);
  const [first] = casts;
  if (!first) return null;
  return (
    <FoldedPart
      label="Where to cast next"
      words={nextWords(first)}
      act={casts.length === 1 ? '1 cast' : `${String(casts.length)} casts`}
      open={open}
      onTurn={() => setOpen(!open)}
    >
      <Text size="small" tone="inkSoft">
        Each takes away that share of what is not yet known of the whole lake’s depth, after those before it.
      </Text>
      {casts.map((next) => (
        <View
          key={next.order}
          style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.small }}
        >
          <Text
            style={{ flex: 1, minWidth: 180 }}
          >{`${nextWords(next)}: ${percent(next.gainShare, 1)}`}</Text>
          <Button
            label="Take it"
            bank
            spoken={`Take it: ${nextWords(next)}`}
            onPress={() => {
              onTake(next.cast);
              setOpen(false);
            }}
          />
        </View>
      ))}
    </FoldedPart>
  );
}

const nextWords = ({ cast }: NextCast): string =>
  `${countWords(cast.wrapsWhole, cast.remainderM)}, ${aimWords(cast)}`;
