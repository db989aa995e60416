import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { WaterArea } from '@mereward/db/entities/lakes/water-area';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { toPlane, type Point } from '@mereward/shared/geometry/plane';
import type { Outline } from '@mereward/shared/geometry/polygon';
import type { LakeWaters, PlaceWater } from '@mereward/shared/lakes/peg-water-contract';
import {
  ownerAt,
  pegWaters,
  waterAreas,
  waterRings,
  type PegStance,
  type PegWaters,
} from '@mereward/shared/lakes/peg-waters';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { digestOf } from '../digest';
import { findLake, originOfLake } from './found';
import { mayChangeLake } from './policy';

/** A lake's pegs, drawn areas and the waters that follow from them, on the lake's own plane. */
export type WatersFound = {
  outline: Outline;
  pegs: Peg[]; // in walking order; an owner in `waters` is a place in this list
  stances: PegStance[];
  areas: WaterArea[]; // in the order they are laid on
  waters: PegWaters;
};

/** Farthest this peg may cast, metres: its own limit, within the lake's. */
export const longestCastOf = (lake: Lake, { details }: Peg): number =>
  Math.min(details.longestCastM ?? lake.details.longestCastM, lake.details.longestCastM);

export function stanceOf(lake: Lake, peg: Peg): PegStance {
  const { origin, arcFromDeg, arcToDeg } = peg.details;
  return {
    at: toPlane(originOfLake(lake), origin),
    arcFromDeg,
    arcToDeg,
    reachM: longestCastOf(lake, peg),
  };
}

export async function watersOf(tx: EntityManager, lake: Lake): Promise<WatersFound> {
  const pegs = await tx.find(Peg, {
    where: { lakeId: lake.id },
    order: { walkingOrder: 'ASC', number: 'ASC' },
  });
  const areas = await tx.find(WaterArea, { where: { lakeId: lake.id }, order: { place: 'ASC' } });
  const stances = pegs.map((peg) => stanceOf(lake, peg));
  return { pegs, stances, areas, ...parted({ lake, pegs, stances, areas }) };
}

type Parting = { outline: Outline; waters: PegWaters };

/** Waters parted lately, by everything that decides them: it takes a tenth of a second, and every peg page asks. */
const lately = new Map<string, Parting>();
const MOST_KEPT = 8;

type Asked = { lake: Lake; pegs: Peg[]; stances: PegStance[]; areas: WaterArea[] };

function parted({ lake, pegs, stances, areas }: Asked): Parting {
  const drawn = areas.map(({ pegId, details }) => ({ pegId, ring: details.ring }));
  const origin = originOfLake(lake);
  const key = digestOf({
    outline: lake.details.outline,
    origin,
    pegs: pegs.map(({ id }, i) => [id, stances[i]]),
    drawn,
  }).toString('hex');
  const known = lately.get(key);
  if (known) return known;
  const outline = outlineInPlane(origin, lake.details.outline);
  const placeOf = new Map(pegs.map(({ id }, i) => [id, i]));
  const waters = pegWaters(
    outline,
    stances,
    drawn.map(({ pegId, ring }) => ({
      peg: pegId === null ? null : (placeOf.get(pegId) ?? null),
      ring: ring.map((place) => toPlane(origin, place)),
    })),
  );
  lately.set(key, { outline, waters });
  for (const oldest of lately.keys()) if (lately.size > MOST_KEPT) lately.delete(oldest);
  return { outline, waters };
}

/** Whose water a place of the plane is, for somebody at this peg. */
export function placeWater({ pegs, waters }: WatersFound, pegId: string, place: Point): PlaceWater {
  const owner = pegs[ownerAt(waters, place)];
  if (!owner) return { pegId: null, number: null, own: false, words: 'In no peg’s water.' };
  const own = owner.id === pegId;
  const words = own ? 'In this peg’s own water.' : `In peg ${owner.number}’s water.`;
  return { pegId: owner.id, number: owner.number, own, words };
}

const WORDS =
  'Each place belongs to the nearest peg that can cast there: inside its arc, within its longest cast and in straight ' +
  'sight over the water; what lies behind another peg’s water is nobody’s. The areas the owner drew come on top, the last one first.';

/** The waters of a lake's pegs. Open to all: they say whose water it is, not what lies in it. */
export async function lakeWaters({ tx, actor }: Ctx, lakeId: string): Promise<LakeWaters> {
  const lake = await findLake(tx, lakeId);
  const { pegs, areas, waters } = await watersOf(tx, lake);
  const { pegsM2, areasM2, nobodysM2 } = waterAreas(waters, pegs.length, areas.length);
  const rings = waterRings(waters, pegs.length);
  return {
    lakeId,
    cellM: waters.frame.cellM,
    pegs: pegs.map(({ id, number, details }, i) => ({
      pegId: id,
      number,
      name: details.name,
      areaM2: Math.round(pegsM2[i] ?? 0),
      rings: rings[i] ?? [],
    })),
    nobodysM2: Math.round(nobodysM2),
    areas: areas.map(({ id, details, version }, i) => ({
      id,
      details,
      takesM2: Math.round(areasM2[i] ?? 0),
      version,
    })),
    words: WORDS,
    may: { change: mayChangeLake(actor, lake.fisheryId) },
  };
}
