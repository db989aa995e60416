import type { GaugeBoardView, LakeView, LevelRecorded } from '@mereward/shared/lakes/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { takeBackLevelHere } from '@/features/surveys/keep-here';
import { boardReads } from '@/features/surveys/visit-words';
import { clockTime } from '@/lib/format-time';

type Props = {
  lake: LakeView;
  board: GaugeBoardView;
  kept: LevelRecorded;
  /** It is on this phone only so far. */
  waits: boolean;
  onTakenBack: () => void;
};

/** What was just recorded, what is odd about it, and the way back when it was misread. */
export function LevelKept({ lake, board, kept, waits, onTakenBack }: Props) {
  const takeBack = useMutation({
    mutationFn: (readingId: string) =>
      takeBackLevelHere({ lake, board }, readingId, new Date().toISOString()),
  });
  const { reading, warnings } = kept;
  return (
    <Note
      kind={warnings.length > 0 ? 'caution' : 'fine'}
      title={`${boardReads(lake, board.id, reading.levelM)} kept ${waits ? 'on this phone ' : ''}at ${clockTime(reading.at, lake.zone)}`}
      live
    >
      {waits ? <Text>It waits to be sent.</Text> : null}
      {warnings.map(({ words }) => (
        <Text key={words}>{words}</Text>
      ))}
      <ProblemNote problem={takeBack.error} />
      <View style={{ alignItems: 'flex-start' }}>
        <Button
          label="Misread: take it back"
          bank
          busy={takeBack.isPending}
          busyLabel="Taking back…"
          onPress={() => takeBack.mutate(reading.id, { onSuccess: onTakenBack })}
        />
      </View>
    </Note>
  );
}
