import type { FreePeg, PegGround, PegState } from '@mereward/shared/bookings/availability-contract';
import type { ShapeName } from '@/components/shape';
import { length, type LengthWish } from '@mereward/shared/units/length-words';

type Look = { shape: ShapeName; tone: 'reed' | 'amber' | 'brick' | 'inkSoft'; word: string };

/** How a peg stands, by shape and word. */
export const PEG_LOOKS = {
  free: { shape: 'triangle', tone: 'reed', word: 'free' },
  held: { shape: 'diamond', tone: 'amber', word: 'held' },
  taken: { shape: 'square', tone: 'inkSoft', word: 'taken' },
  blocked: { shape: 'bar', tone: 'inkSoft', word: 'kept back' },
  closed: { shape: 'cross', tone: 'brick', word: 'closed' },
} as const satisfies Record<PegState, Look>;

/** "0.8 to 2.6 m, gravel and clay"; null where nothing is known or shown. */
export function groundWords(ground: PegGround | null, units: LengthWish): string | null {
  if (ground === null) return null;
  const depths = `${length(ground.shallowestM, units)} to ${length(ground.deepestM, units)}`;
  const bottoms = ground.bottoms.slice(0, 2).join(' and ');
  return bottoms === '' ? depths : `${depths}, ${bottoms}`;
}

type Way = Pick<FreePeg, 'fromParkingM' | 'steps' | 'stepFree' | 'barrow'>;

/** The way to a peg in a few words: "120 m from the car, step-free with help". Nothing known gives nothing. */
export function wayWords({ fromParkingM, steps, stepFree, barrow }: Way): string {
  const parts = [
    fromParkingM === null ? null : `${String(fromParkingM)} m from the car`,
    stepFree.kind === 'measured_suitable'
      ? 'step-free, measured'
      : stepFree.kind === 'assisted'
        ? 'step-free with help'
        : steps !== null && steps > 0
          ? `${String(steps)} ${steps === 1 ? 'step' : 'steps'}`
          : null,
    barrow === 'yes' ? 'barrow' : null,
  ];
  return parts.filter((part) => part !== null).join(', ');
}

const squared = (one: FreePeg, other: FreePeg): number => {
  const east = (one.position[0] - other.position[0]) * Math.cos((one.position[1] * Math.PI) / 180);
  return east * east + (one.position[1] - other.position[1]) ** 2;
};

/**
 * Free pegs of the same lake most like one that is gone: those with its commonest bottom first, then the nearest.
 * Common practice, no published source.
 */
export function pegsLike(gone: FreePeg, pegs: readonly FreePeg[], most = 3): FreePeg[] {
  const bottom = gone.ground?.bottoms[0];
  const unlike = ({ ground }: FreePeg): number =>
    bottom !== undefined && ground?.bottoms[0] === bottom ? 0 : 1;
  return pegs
    .filter(({ pegId, lakeId, state }) => state === 'free' && lakeId === gone.lakeId && pegId !== gone.pegId)
    .sort((a, b) => unlike(a) - unlike(b) || squared(gone, a) - squared(gone, b))
    .slice(0, most);
}
