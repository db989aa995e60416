import { overheadCaution } from '@mereward/shared/charts/cautions';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';

/** A power line near the peg: never behind a press, always before anything else. */
export function OverheadNote({ details }: { details: PegDetails }) {
  const words = overheadCaution(details);
  if (!words) return null;
  const { kind, fishing, operator } = details.overheadLine;
  return (
    <Note kind={kind === 'unknown' || fishing === 'ok' ? 'caution' : 'danger'} title="Power line overhead">
      <Text>{words}</Text>
      {operator ? <Text>{`Network operator: ${operator}.`}</Text> : null}
    </Note>
  );
}

/** What can hurt here, in the fishery's words. */
export function PegHazards({ details }: { details: PegDetails }) {
  if (details.hazards.length === 0) return null;
  return (
    <Section title="Hazards">
      <View role="list" style={{ gap: space.small }}>
        {details.hazards.map((hazard) => (
          <View key={hazard} role="listitem">
            <Text>{`• ${hazard}`}</Text>
          </View>
        ))}
      </View>
    </Section>
  );
}
