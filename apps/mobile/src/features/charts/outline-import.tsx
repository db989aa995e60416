import { useState } from 'react';
import type { OutlineFinding, OutlineRead } from '@mereward/shared/lakes/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { StatusShape } from '@/components/status-shape';
import { space } from '@/constants/layout';
import { readOutline } from '@/features/lakes/office-api';
import { sketchOf, type Sketch } from '@/features/lakes/outline-sketch';
import { pickTextFile } from '@/lib/pick-file';

const MOST_LETTERS = 5_000_000;
const ENDINGS = '.geojson,.json,.gpx';

/** Reads an outline from a file and says what was found in it. */
export function OutlineImport({ onRead, replaces }: { onRead: (sketch: Sketch) => void; replaces: boolean }) {
  const [tooLarge, setTooLarge] = useState<string | null>(null);
  const read = useMutation({
    mutationFn: readOutline,
    onSuccess: ({ outline }) => {
      if (outline) onRead(sketchOf(outline));
    },
  });
  const choose = async (): Promise<void> => {
    const file = await pickTextFile(ENDINGS);
    if (!file) return;
    const large = file.text.length > MOST_LETTERS;
    setTooLarge(large ? file.name : null);
    if (large) read.reset();
    else read.mutate({ filename: file.name.slice(-200), text: file.text });
  };
  return (
    <View style={{ gap: space.small, alignItems: 'flex-start' }}>
      <Button
        label="Read it from a file"
        busy={read.isPending}
        busyLabel="Reading the file…"
        onPress={() => void choose()}
      />
      {tooLarge ? (
        <Note kind="danger" title={`${tooLarge} is larger than 5 MB`} live>
          Simplify the line, or export only this water. What is drawn here stays as it is.
        </Note>
      ) : null}
      <ProblemNote problem={read.error} />
      {read.data ? (
        <Found name={read.variables?.filename ?? ''} read={read.data} replaces={replaces} />
      ) : null}
    </View>
  );
}

const looks: Record<
  OutlineFinding['kind'],
  { shape: 'triangle' | 'cross' | 'dot'; tone: 'reed' | 'brick' | 'water' }
> = {
  mended: { shape: 'triangle', tone: 'reed' },
  refused: { shape: 'cross', tone: 'brick' },
  noted: { shape: 'dot', tone: 'water' },
};

function Found({ name, read, replaces }: { name: string; read: OutlineRead; replaces: boolean }) {
  const { outline, findings } = read;
  const taken = outline !== null;
  const points = outline?.coordinates.reduce((sum, ring) => sum + ring.length - 1, 0) ?? 0;
  return (
    <Note
      kind={taken ? 'fine' : 'danger'}
      title={taken ? `${name} is read: ${String(points)} points` : `${name} can’t be used as it is`}
      live
    >
      {taken
        ? 'Look whether it is right. It is kept when you keep the lake.'
        : `Nothing was changed${replaces ? '; what is drawn here stays' : ''}. Put right what is named here and read it again, or draw the shore by hand.`}
      {findings.length > 0 ? (
        <List label="Found in the file">
          {findings.map(({ kind, words }) => (
            <Row key={words} title={words} end={<StatusShape {...looks[kind]} word={kind} size="small" />} />
          ))}
        </List>
      ) : null}
    </Note>
  );
}
