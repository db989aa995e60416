import type { OutlineReading } from '@mereward/shared/geometry/outline';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { openRingOf, ringName, type Sketch } from '@/features/lakes/outline-sketch';
import { useUnits } from '@/hooks/use-units';
import { area } from '@/lib/format';

type Props = {
  sketch: Sketch;
  reading: OutlineReading | null;
  /** So many points that they show only from near by. */
  crowded: boolean;
};

/** What to do next with the drawing, how large the water is, and what is wrong with it. */
export function OutlineFound({ sketch, reading, crowded }: Props) {
  const units = useUnits();
  const faults = (reading?.findings ?? []).filter(({ kind }) => kind === 'refused');
  const areaM2 = reading?.areaM2 ?? null;
  return (
    <>
      <Text tone="inkSoft">{`${crowded ? 'Come closer until the points show. ' : ''}${nextWords(sketch)}`}</Text>
      {areaM2 !== null ? (
        <Text role="status" weight="semibold">
          {`Water: ${area(areaM2, units)}${openRingOf(sketch) === null ? '' : ' if it were closed now'}`}
        </Text>
      ) : null}
      {faults.map(({ words }) => (
        <Note key={words} kind="caution" live>
          {words}
        </Note>
      ))}
    </>
  );
}

function nextWords(sketch: Sketch): string {
  const open = openRingOf(sketch);
  const drawn = open === null ? 0 : (sketch.rings[open]?.places.length ?? 0);
  if (sketch.rings.length === 0 || (open === 0 && drawn === 0))
    return 'Tap along the shore, point after point, all the way round.';
  if (open === null)
    return 'Drag a point to move it. Tap a point to choose it, or between two points to put one in.';
  if (drawn === 0) return `Tap round ${ringName(open)}, inside the shore.`;
  return drawn < 3
    ? `${String(drawn)} of ${ringName(open)}: at least three points make a ring.`
    : `${String(drawn)} points of ${ringName(open)}. Go on round it, then press “Close the ring” or tap its first point.`;
}
