import type { ChartView } from '@mereward/shared/charts/contract';
import { View } from 'react-native';
import { Loaded } from '@/components/loaded';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { aimWords, ownCountWords } from '@mereward/shared/charts/spot-figures';
import type { StandOutPatch } from '@mereward/shared/charts/chart-answers';
import { changeTale, featureTale, patchTale, type Tale } from './tale';
import type { Tales } from './use-tales';
import { waterArea } from './water-words';

type Props = { chart: ChartView; tales: Tales; onPeg: (pegId: string) => void };

/** In words what the map shows of features, patches, waters and changes; a press chooses it there. */
export function TaleLists({ chart, tales, onPeg }: Props) {
  const { shown } = tales;
  return (
    <>
      {shown.features && chart.depth ? <Features tales={tales} /> : null}
      {shown.patches && chart.substrate ? <Patches tales={tales} /> : null}
      {shown.changes ? <Changes tales={tales} /> : null}
      {shown.waters ? <Waters tales={tales} onPeg={onPeg} /> : null}
    </>
  );
}

type Part = { tales: Tales };

const Missing = ({ words }: { words: string | null }) => (
  <Text tone="inkSoft">{words ?? 'This chart tells nothing of it.'}</Text>
);

function TaleRow({ tale, tales, note }: Part & { tale: Tale; note?: string }) {
  const chosen = tales.chosen?.key === tale.key;
  return (
    <Row
      title={tale.title}
      note={[tale.words, note].filter(Boolean).join(' ')}
      end={
        tale.certain ? undefined : (
          <StatusShape shape="diamond" tone="amber" word="not certain" size="small" />
        )
      }
      chosen={chosen}
      onPress={() => tales.choose(chosen ? null : tale.key)}
    />
  );
}

function Features({ tales }: Part) {
  return (
    <Section title="Features" bare>
      <Loaded query={tales.features} waiting="Reading the features…">
        {({ features, whyNot, method }) =>
          features === null ? (
            <Missing words={whyNot} />
          ) : features.length === 0 ? (
            <Missing words="No bar, shelf, gully or hole stands out of the survey’s own error here." />
          ) : (
            <>
              <List label="Features">
                {features.map(featureTale).map((tale) => (
                  <TaleRow key={tale.key} tale={tale} tales={tales} />
                ))}
              </List>
              <Text size="small" tone="inkSoft">
                {method}
              </Text>
            </>
          )
        }
      </Loaded>
    </Section>
  );
}

function Patches({ tales }: Part) {
  return (
    <Section title="Patches that stand out" bare>
      <Loaded query={tales.patches} waiting="Reading the patches…">
        {({ patches, whyNot, caution }) =>
          patches === null ? (
            <Missing words={whyNot} />
          ) : (
            <>
              <Note kind="caution">{caution}</Note>
              {patches.length === 0 ? (
                <Missing words="No small area differs from what lies round it." />
              ) : (
                <List label="Patches that stand out">
                  {patches.map((patch) => (
                    <PatchRow key={patch.rank} patch={patch} tales={tales} />
                  ))}
                </List>
              )}
            </>
          )
        }
      </Loaded>
    </Section>
  );
}

function PatchRow({ patch, tales }: Part & { patch: StandOutPatch }) {
  const units = useUnits();
  const from = patch.reach.map(
    ({ number, own, cast }) =>
      `${number}${own ? ' (its own water)' : ''}: ${ownCountWords(cast, units)}, ${aimWords(cast)}.`,
  );
  const note = from.length ? `From ${from.join(' ')}` : 'No peg reaches it.';
  return <TaleRow tale={patchTale(patch)} tales={tales} note={note} />;
}

function Changes({ tales }: Part) {
  return (
    <Section title="What changed" bare>
      <Loaded query={tales.changes} waiting="Comparing the versions…">
        {({ areas, since, earlier, whyNot, words }) => (
          <View style={{ gap: space.small }}>
            {earlier.length > 1 ? (
              <Select
                label="Since"
                choices={earlier.map(({ id, version }) => ({ key: id, label: `Chart ${version}` }))}
                value={since?.id ?? null}
                onChange={tales.setSince}
              />
            ) : null}
            <Text>{words}</Text>
            {areas === null && whyNot !== words ? <Missing words={whyNot} /> : null}
            {areas?.length ? (
              <List label="Areas that changed">
                {areas.map(changeTale).map((tale) => (
                  <TaleRow key={tale.key} tale={tale} tales={tales} />
                ))}
              </List>
            ) : null}
          </View>
        )}
      </Loaded>
    </Section>
  );
}

function Waters({ tales, onPeg }: Part & { onPeg: (pegId: string) => void }) {
  const units = useUnits();
  return (
    <Section title="Pegs’ waters" bare>
      <Loaded query={tales.waters} waiting="Parting the water…">
        {({ pegs, words, nobodysM2 }) => (
          <>
            <Text size="small" tone="inkSoft">
              {`${words} ${waterArea(nobodysM2, units)} is no peg’s.`}
            </Text>
            <List label="Pegs’ waters">
              {pegs.map(({ pegId, number, name, areaM2 }) => (
                <Row
                  key={pegId}
                  title={[number, name].filter(Boolean).join(', ')}
                  end={areaM2 === 0 ? 'none' : waterArea(areaM2, units)}
                  onPress={() => onPeg(pegId)}
                />
              ))}
            </List>
          </>
        )}
      </Loaded>
    </Section>
  );
}
