import type { Reduced } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { callWords, depthWords } from '@/features/surveys/call-words';
import { useUnits } from '@/hooks/use-units';

/** What the cast comes out as while it is typed: the bottom and how sure, the depth and its spread, the grade. */
export function LiveCall({ reduced }: { reduced: Reduced | null }) {
  const units = useUnits();
  if (reduced === null)
    return (
      <Text tone="inkSoft" size="small">
        The wraps, and what was felt, give the call here.
      </Text>
    );
  if (!reduced.ok)
    return (
      <Note kind="caution" title={reduced.reason} live>
        {reduced.remedy}
      </Note>
    );
  const { sounding } = reduced;
  return (
    <View role="status" style={{ gap: space.hair }}>
      <Text size="title" weight="semibold">
        {callWords(sounding)}
      </Text>
      <Text tone="inkSoft">{`${depthWords(sounding, units)} · grade ${sounding.grade}`}</Text>
      {sounding.askAgain ? (
        <Note kind="caution" title="Landing, drag and what came back don’t agree">
          Cast again 1–2 m away. Until then this cast is no better than grade C.
        </Note>
      ) : null}
      {sounding.warnings.map((words) => (
        <Text key={words} size="small" tone="amber">
          {words}
        </Text>
      ))}
    </View>
  );
}
