import type { LakeView } from '@mereward/shared/lakes/contract';
import type { CastView, Kit } from '@mereward/shared/surveys/contract';
import { UNREAD_DEPTH } from '@mereward/shared/surveys/error-budget';
import { windFor, type SpotKit } from '@mereward/shared/surveys/same-spot';
import { BY_COMPASS, type CastTyped } from '@/features/surveys/cast-draft';

/** A cast somebody proposes: how far, and over what or on which true bearing. */
export type SuggestedCast = {
  rangeM: number;
  bearingDeg: number;
  mark: { code: string; offsetDeg: number } | null;
};

/** What whoever proposes casts is told, and what to call when one is taken. */
export type SuggestTerms = {
  lake: LakeView;
  pegId: string;
  /** Where this visit's casts fell, on the lake's plane. */
  made: readonly { xM: number; yM: number }[];
  onTake: (cast: SuggestedCast) => void;
};

export const placesOf = (casts: readonly CastView[]): SuggestTerms['made'] =>
  casts.flatMap(({ reduced }) => (reduced.ok ? [{ xM: reduced.sounding.xM, yM: reduced.sounding.yM }] : []));

/** The part of a kit that says what a count is. */
export type WoundKit = SpotKit & Pick<Kit, 'declinationDeg'>;

/** A proposed cast in the form, counted on this visit's own sticks to the nearest wrap; null under the rod itself. */
export function suggestedTyped(
  cast: SuggestedCast,
  { marks }: { marks: readonly { id: string; details: { code: string } }[] },
  kit: WoundKit,
): Pick<CastTyped, 'aim' | 'offsetDeg' | 'compassDeg' | 'wrapsWhole' | 'remainder'> | null {
  const wound = windFor(cast.rangeM, kit, UNREAD_DEPTH.depthM);
  if (!wound.ok) return null;
  const { whole, remainderM } = wound.wraps;
  const wrapsWhole = remainderM > kit.stickSpacingM / 2 ? whole + 1 : whole;
  const mark = marks.find(({ details }) => details.code === cast.mark?.code);
  const compassDeg = (((cast.bearingDeg - kit.declinationDeg) % 360) + 360) % 360;
  return {
    wrapsWhole,
    remainder: '',
    aim: mark?.id ?? BY_COMPASS,
    offsetDeg: mark ? Math.round(cast.mark?.offsetDeg ?? 0) : 0,
    compassDeg: mark ? '' : String(Math.round(compassDeg) % 360),
  };
}
