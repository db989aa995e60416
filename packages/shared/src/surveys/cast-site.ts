import type { LonLat } from '../geometry/plane';
import type { Outline } from '../geometry/polygon';
import type { MarkDetails } from '../lakes/contract';
import type { CastObservation } from './contract';
import type { BottomTables } from './bottom-evidence';
import type { LeadCalibration } from './lead-fall';

/** The place on a peg where the angler stands. */
export type Stance = {
  place: LonLat;
  sigmaM: number; // of its coordinates, each way: see `stanceSigmaM`
  originMarked: boolean; // a dot or screw to stand on
};

/** The far-bank mark of a cast's aim, as catalogued. */
export type AimMark = {
  name: string;
  place: LonLat;
  sigmaM: number;
  permanence: MarkDetails['permanence'];
  ofThisLake: boolean;
};

/** The gauge board over a visit, metres as the board reads; instants in ISO 8601. `endAt` is null while it is open. */
export type VisitGauge = {
  startAt: string;
  startM: number;
  endAt: string | null;
  endM: number | null;
  datumM: number; // the reading that is chart datum
  higherNumberHigherWater: boolean;
};

/** Everything about the place that the reduction of a cast needs beside the observation and the kit. */
export type CastSite = {
  origin: LonLat; // of the lake's plane
  outline: Outline; // in that plane
  stance: Stance;
  mark: AimMark | null; // the mark the cast names; null when it is not in the catalogue, or aimed by compass
  gauge: VisitGauge | null; // null: the water level of the visit is not known
  observedAt: string;
  lead: LeadCalibration | null; // of this very lead and line, for a counted fall
  earlier: readonly CastObservation[]; // the peg's other casts: a snag takes two solid stops at one place
  tables?: BottomTables | undefined; // the fishery's likelihoods in force; none: the built-in
};

/** Why something can't be worked out, and what to do about it, in words for the person at the water. */
export type Refusal = { ok: false; reason: string; remedy: string };

export function refuse(reason: string, remedy: string): Refusal {
  return { ok: false, reason, remedy };
}
