import { useState } from 'react';
import type { GaugeBoardView, LakeView, LevelReadingView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { useTakeBackReading } from '@/features/lakes/office-api';
import { figure } from '@/lib/format';
import { dayAndTime } from '@/lib/format-time';

/** The readings of a board, newest first; a misread one can be taken back. */
export function ReadingsTable({ lake, board }: { lake: LakeView; board: GaugeBoardView }) {
  const [doubted, setDoubted] = useState<LevelReadingView | null>(null);
  const takeBack = useTakeBackReading(lake.id);
  const when = ({ at }: LevelReadingView): string => dayAndTime(at, lake.zone);
  if (board.readings.length === 0)
    return (
      <Section title="Readings">
        <Empty title="No reading yet">
          {lake.may.recordLevel
            ? 'Read the board and record it above. With a reading, every depth can be told for today.'
            : 'Bailiffs and up record readings.'}
        </Empty>
      </Section>
    );
  return (
    <Section title="Readings">
      <ProblemNote problem={takeBack.error} />
      <Table
        caption={`Readings of ${board.details.code}`}
        csvName={`level-${board.details.code}`}
        rows={board.readings}
        rowKey={({ id }) => id}
        columns={[
          { key: 'at', head: 'Read', value: ({ at }) => at, show: when },
          {
            key: 'level',
            head: 'Board reads',
            value: ({ levelM }) => levelM,
            show: ({ levelM }) => `${figure(levelM, 2)} m`,
            figures: true,
          },
          { key: 'by', head: 'By', value: ({ by }) => by || null },
          { key: 'note', head: 'Note', value: ({ note }) => note || null },
          ...(lake.may.recordLevel
            ? [
                {
                  key: 'back',
                  head: 'Misread?',
                  value: () => '',
                  show: (reading: LevelReadingView) => (
                    <View style={{ alignItems: 'flex-start' }}>
                      <Button
                        label="Take back"
                        kind="quiet"
                        spoken={`Take back the reading of ${when(reading)}`}
                        onPress={() => setDoubted(reading)}
                      />
                    </View>
                  ),
                },
              ]
            : []),
        ]}
      />
      <Confirm
        open={doubted !== null}
        title="Take this reading back?"
        words={
          doubted
            ? `${figure(doubted.levelM, 2)} m, read ${when(doubted)}, is removed for good. Depths today follow the newest reading left.`
            : ''
        }
        act="Take it back"
        danger
        busy={takeBack.isPending}
        onClose={() => setDoubted(null)}
        onAct={() => {
          if (doubted) takeBack.mutate(doubted.id, { onSettled: () => setDoubted(null) });
        }}
      />
    </Section>
  );
}
