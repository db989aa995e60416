import type { Reduced } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { callWords, depthWords } from '@/features/surveys/call-words';
import { useTheme } from '@/hooks/use-theme';
import { useUnits } from '@/hooks/use-units';

/** What the cast comes out as while it is typed: the bottom and how sure, the depth and its spread, the grade. */
export function LiveCall({ reduced }: { reduced: Reduced | null }) {
  return (
    <View role="status" style={{ width: '100%', gap: space.hair }}>
      <Call reduced={reduced} />
    </View>
  );
}

function Call({ reduced }: { reduced: Reduced | null }) {
  const units = useUnits();
  if (reduced === null)
    return (
      <Text tone="inkSoft" size="small">
        The wraps, and what was felt, give the call here.
      </Text>
    );
  if (!reduced.ok)
    return (
      <>
        <Warned words={reduced.reason} />
        <Text size="small">{reduced.remedy}</Text>
      </>
    );
  const { sounding } = reduced;
  return (
    <>
      <View
        style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'baseline', columnGap: space.medium }}
      >
        <Text size="lead" weight="semibold">
          {callWords(sounding)}
        </Text>
        <Text size="small" tone="inkSoft">
          {`${depthWords(sounding, units)} · grade ${sounding.grade}`}
        </Text>
      </View>
      {sounding.askAgain ? (
        <Warned words="What was felt doesn’t agree. Cast again 1–2 m away; until then no better than grade C." />
      ) : null}
    </>
  );
}

function Warned({ words }: { words: string }) {
  const { colours } = useTheme();
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.hair }}>
      <Shape name="diamond" colour={colours.amber} />
      <Text size="small" weight="semibold" tone="amber" style={{ flex: 1 }}>
        {words}
      </Text>
    </View>
  );
}
