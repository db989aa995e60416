import { geodesicAlong } from '@mereward/shared/geometry/geodesic';
import { fromPlane } from '@mereward/shared/geometry/plane';
import type { LakePolygon, MarkDetails, PegDetails } from '@mereward/shared/lakes/contract';
import type { CastObservation } from '@mereward/shared/surveys/contract';
import { markDetails, pegDetails, WATER_CENTRE } from './water-details';

const LONG_M = 150;
const WIDE_M = 62;

/** A long water, 300 × 124 m, so that a mark 148 m from a peg of its south bank stands on the far one. */
export function longOutline(): LakePolygon {
  const ring = Array.from({ length: 120 }, (_, i) => {
    const turn = (i * 2 * Math.PI) / 120;
    const [lon, lat] = fromPlane(WATER_CENTRE, { xM: LONG_M * Math.cos(turn), yM: WIDE_M * Math.sin(turn) });
    return [lon, lat] as [number, number];
  });
  return { type: 'Polygon', coordinates: [[...ring, ring[0] ?? [0, 0]]] };
}

function southBank(): [number, number] {
  const [lon, lat] = fromPlane(WATER_CENTRE, { xM: 0, yM: -WIDE_M });
  return [lon, lat];
}

/** Peg FO7, in the middle of the long water's south bank, looking north. */
export function longPegDetails(): PegDetails {
  const origin = southBank();
  return pegDetails({
    number: 'FO7',
    name: 'The Point',
    position: origin,
    origin,
    originFixedBy: 'tape_or_plan',
    arcFromDeg: 315,
    arcToDeg: 45,
    longestCastM: 70,
  });
}

/** The pump-house chimney, 148 m to the north of peg FO7. */
export function chimneyDetails(): MarkDetails {
  const [lon, lat] = geodesicAlong(southBank(), 0, 148);
  return markDetails({ code: 'M3', name: 'pump-house chimney', position: [lon, lat], sigmaM: 0.5 });
}

/** A made-up bed before FO7: a shelf that falls away, a bar across at about fifty metres. Metres at board 0.62. */
export function madeUpDepthM(rangeM: number, offsetDeg: number): number {
  const shelf = 3.2 * (1 - Math.exp(-rangeM / 18));
  return shelf - 0.8 * Math.exp(-(((rangeM - 51) / 7) ** 2)) + 0.004 * offsetDeg;
}

/** A fan of casts from FO7 that covers its arc: every ten degrees, every second wrap. */
export function aFan(): Partial<CastObservation>[] {
  const fan: Partial<CastObservation>[] = [];
  for (let offsetDeg = -40; offsetDeg <= 40; offsetDeg += 10)
    for (let wraps = 4; wraps <= 18; wraps += 2) {
      const depthM = madeUpDepthM(wraps * 3.6576, offsetDeg);
      const pulls = Math.max(1, Math.round((depthM - 0.25) / 0.3048 + 0.5));
      const silt = wraps > 16 || offsetDeg > 20;
      fan.push({
        wrapsWhole: wraps,
        lineText: `${wraps} + 0`,
        pulls,
        ...(silt ? { drop: 'soft_slow', drag: 'smooth_slow_heavy', cameBack: ['black_silt'] } : {}),
        aim: { by: 'mark', markId: '', offsetDeg },
      });
    }
  return fan;
}

const HEADING = 'peg,mark,offset_deg,wraps_whole,wraps_remainder_mm,drop,drag,returned,depth_pulls';

/** Casts of the fan as a surveyor with a notebook would bring them: a table, one row a cast. */
export function castsFile(fan: readonly Partial<CastObservation>[]): string {
  const rows = fan.map(({ aim, wrapsWhole, pulls, drop = 'sharp_crack', drag = 'fine_rattle', cameBack }) =>
    [
      'FO7',
      'M3',
      aim?.by === 'mark' ? aim.offsetDeg : 0,
      wrapsWhole,
      0,
      drop,
      drag,
      (cameBack ?? ['none']).join(';'),
      pulls,
    ].join(','),
  );
  return [HEADING, ...rows].join('\n');
}
