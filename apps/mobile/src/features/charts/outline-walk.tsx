import { useState } from 'react';
import type { OutlineSource } from '@mereward/shared/lakes/outline-source';
import { walkReport } from '@mereward/shared/lakes/shore-walk';
import { walkedRing } from '@mereward/shared/lakes/walked-ring';
import { View } from 'react-native';
import { Note } from '@/components/note';
import { space } from '@/constants/layout';
import { openRingOf, putRing, type Sketch } from '@/features/lakes/outline-sketch';
import { ShoreWalkPanel } from '@/features/lakes/shore-walk-panel';
import type { ShoreWalking } from '@/features/lakes/use-shore-walk';
import { ringWords, surenessWords } from '@/features/lakes/walk-words';
import { useUnits } from '@/hooks/use-units';

type Props = {
  walking: ShoreWalking;
  sketch: Sketch;
  onRing: (sketch: Sketch) => void;
  /** Told when the shore itself was walked. */
  onSource: (source: OutlineSource) => void;
};
type Said = { kind: 'fine' | 'caution'; title: string; words: string };

/** Walking as a way to draw: what is walked becomes a ring of the drawing, and it is told how sure that is. */
export function OutlineWalk({ walking, sketch, onRing, onSource }: Props) {
  const units = useUnits();
  const [said, setSaid] = useState<Said | null>(null);
  const { walk, of } = walking;
  const close = (): void => {
    const ring = walk && walkedRing(walk);
    if (!walk || !ring) {
      const words = 'What was walked so far lies on a line. Go on round the water, then close it.';
      setSaid({ kind: 'caution', title: 'This makes no ring yet', words });
      return;
    }
    const words = [
      ringWords(ring, units),
      surenessWords(walk, units),
      'Look it over, drag what is wrong, then keep the outline.',
    ];
    setSaid({
      kind: 'fine',
      title: of === 'shore' ? 'The walk is the shore now' : 'The walk is an island now',
      words: words.filter(Boolean).join(' '),
    });
    onRing(putRing(sketch, of, ring.places));
    const { radiusM } = walkReport(walk);
    if (of === 'shore' && radiusM !== null)
      onSource({ way: 'walked', withinM: Math.min(50, Math.max(0.1, Math.round(radiusM * 10) / 10)) });
    walking.end();
  };
  const drawing = openRingOf(sketch);
  const begun = drawing !== null && (sketch.rings[drawing]?.places.length ?? 0) > 0;
  return (
    <View style={{ gap: space.small }}>
      {walk || !begun ? (
        <ShoreWalkPanel walking={walking} hasShore={sketch.rings.length > 0} onClose={close} />
      ) : null}
      {said && (said.kind === 'fine') === (walk === null) ? (
        <Note kind={said.kind} title={said.title} live>
          {said.words}
        </Note>
      ) : null}
    </View>
  );
}
