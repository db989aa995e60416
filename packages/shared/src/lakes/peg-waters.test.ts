import fc from 'fast-check';
import { expect, test } from 'vitest';
import { pointAlong, type Point } from '../geometry/point';
import { signedAreaM2, type Outline } from '../geometry/polygon';
import { columnXM, rowYM } from '../geometry/cell-frame';
import {
  reachFrom,
  LAND,
  NOBODY,
  ownerAt,
  pegWaters,
  waterAreas,
  waterRings,
  type PegStance,
} from './peg-waters';

const box = (w: number, s: number, e: number, n: number): Point[] => [
  { xM: w, yM: s },
  { xM: e, yM: s },
  { xM: e, yM: n },
  { xM: w, yM: n },
];
const pond: Outline = { shore: box(0.2, 0.2, 100.2, 60.2), islands: [] };
const allRound = { arcFromDeg: 0, arcToDeg: 359.999, reachM: 200 };
const at = (xM: number, yM: number, wishes: Partial<PegStance> = {}): PegStance => ({
  at: { xM, yM },
  ...allRound,
  ...wishes,
});

test('the water lies with the nearest stance', () => {
  const waters = pegWaters(pond, [at(20, 0.3), at(80, 0.3)]);
  expect(ownerAt(waters, { xM: 30, yM: 30 })).toBe(0);
  expect(ownerAt(waters, { xM: 49, yM: 50 })).toBe(0);
  expect(ownerAt(waters, { xM: 51, yM: 50 })).toBe(1);
  expect(ownerAt(waters, { xM: 50, yM: 90 })).toBe(LAND);
  expect(waterAreas(waters, 2, 0)).toEqual({ pegsM2: [3000, 3000], areasM2: [], nobodysM2: 0 });
});

test('what nobody casts to is nobody’s', () => {
  const waters = pegWaters(pond, [at(50, 0.3, { reachM: 25 })]);
  const { pegsM2, nobodysM2 } = waterAreas(waters, 1, 0);
  // Half a circle of 25 m on cells of half a metre: an edge of 79 m, each cell of it right to a quarter of a metre.
  expect(Math.abs(pegsM2[0]! - (Math.PI * 25 ** 2) / 2)).toBeLessThan(20);
  expect(nobodysM2).toBeGreaterThan(4000);
  expect(pegsM2[0]! + nobodysM2).toBeCloseTo(6000, 6);
});

test('an island hides what lies behind it, which goes to the next stance that sees it', () => {
  const islanded: Outline = { shore: box(0.2, 0.2, 100.2, 60.2), islands: [box(45, 20, 55, 30).reverse()] };
  const behind = { xM: 50, yM: 34 };
  expect(ownerAt(pegWaters(islanded, [at(50, 0.3)]), behind)).toBe(NOBODY);
  expect(ownerAt(pegWaters(islanded, [at(50, 0.3), at(100, 55)]), behind)).toBe(1);
  expect(ownerAt(pegWaters(pond, [at(50, 0.3), at(100, 55)]), behind)).toBe(0);
});

test('a peg’s arc ends its water, and the neighbour has what lies beyond', () => {
  const straight = { arcFromDeg: 350, arcToDeg: 10 };
  const waters = pegWaters(pond, [at(40, 0.3, straight), at(90, 0.3)]);
  expect(ownerAt(waters, { xM: 41, yM: 30 })).toBe(0);
  expect(ownerAt(waters, { xM: 60, yM: 10 })).toBe(1);
});

test('water that can only be cast to over another’s is nobody’s', () => {
  const straight = { arcFromDeg: 350, arcToDeg: 10 };
  const waters = pegWaters(pond, [at(40, 0.3, straight), at(90, 0.3)]);
  // The narrow wedge before the first stance cuts the pond in two; the second sees all of it.
  expect(ownerAt(waters, { xM: 15, yM: 10 })).toBe(NOBODY);
  expect(ownerAt(pegWaters(pond, [at(90, 0.3)]), { xM: 15, yM: 10 })).toBe(0);
});

test('of two drawn areas the last one wins, and what lies over land takes nothing', () => {
  const areas = [
    { peg: 1, ring: box(10.2, 10.2, 30.2, 30.2) },
    { peg: null, ring: box(20.2, 10.2, 40.2, 30.2) },
    { peg: 0, ring: box(-50, -50, -10, -10) },
  ];
  const waters = pegWaters(pond, [at(20, 0.3), at(80, 0.3)], areas);
  expect(ownerAt(waters, { xM: 15, yM: 20 })).toBe(1);
  expect(ownerAt(waters, { xM: 25, yM: 20 })).toBe(NOBODY);
  expect(waterAreas(waters, 2, 3).areasM2).toEqual([200, 400, 0]);
});

test('reach is told condition by condition', () => {
  const peg = at(50, 0.3, { arcFromDeg: 340, arcToDeg: 20, reachM: 40 });
  expect(reachFrom(pond, peg)({ xM: 50, yM: 50 })).toEqual({ inArc: true, inRange: false, inSight: true });
  expect(reachFrom(pond, peg)({ xM: 80, yM: 10 })).toEqual({ inArc: false, inRange: true, inSight: true });
});

const lobed = fc
  .array(fc.double({ min: 25, max: 60, noNaN: true }), { minLength: 5, maxLength: 14 })
  .map((radii): Outline => {
    const shore = radii.map((r, i) => {
      const angle = (2 * Math.PI * i) / radii.length;
      return { xM: r * Math.cos(angle), yM: r * Math.sin(angle) };
    });
    return { shore, islands: [box(-4, -3, 3, 5).reverse()] };
  });
const water = fc.record({
  outline: lobed,
  pegs: fc.array(fc.tuple(fc.nat(359), fc.integer({ min: 10, max: 359 }), fc.integer({ min: 5, max: 120 })), {
    minLength: 1,
    maxLength: 6,
  }),
  areas: fc.array(fc.tuple(fc.nat(5), fc.integer({ min: -40, max: 40 }), fc.integer({ min: -40, max: 40 })), {
    maxLength: 3,
  }),
});

test('two pegs’ waters never overlap, and together with nobody’s they are the whole water', () => {
  fc.assert(
    fc.property(water, ({ outline, pegs, areas }) => {
      const stances = pegs.map(([turn, width, reachM]): PegStance => {
        const corner = outline.shore[turn % outline.shore.length]!;
        return { at: corner, arcFromDeg: turn, arcToDeg: (turn + width) % 360, reachM };
      });
      const drawn = areas.map(([peg, xM, yM]) => ({
        peg: peg < pegs.length ? peg : null,
        ring: box(xM, yM, xM + 23, yM + 17),
      }));
      const waters = pegWaters(outline, stances, drawn);
      const rings = waterRings(waters, pegs.length);
      const { pegsM2 } = waterAreas(waters, pegs.length, drawn.length);
      rings.forEach((own, peg) => expectSameArea(own, pegsM2[peg]!, waters.frame.cellM));
      for (let node = 0; node < waters.owner.length; node += 23) {
        const row = Math.floor(node / waters.frame.columns);
        const place = {
          xM: columnXM(waters.frame, node % waters.frame.columns) + 0.017,
          yM: rowYM(waters.frame, row) + 0.013,
        };
        const inside = rings.flatMap((own, peg) => (insideRings(own, place) ? [peg] : []));
        expect(inside.length).toBeLessThanOrEqual(1);
      }
    }),
    { numRuns: 15 },
  );
});

/** Even-odd over all rings of one peg. */
function insideRings(rings: readonly (readonly number[])[], { xM, yM }: Point): boolean {
  let inside = false;
  for (const ring of rings) {
    for (let i = 0; i + 3 < ring.length; i += 2) {
      const [ax, ay, bx, by] = [ring[i]!, ring[i + 1]!, ring[i + 2]!, ring[i + 3]!];
      if (ay > yM !== by > yM && xM < ax + ((yM - ay) / (by - ay)) * (bx - ax)) inside = !inside;
    }
  }
  return inside;
}

/** Cut corners and thinning move a border by less than half a cell. */
function expectSameArea(rings: readonly (readonly number[])[], areaM2: number, cellM: number): void {
  let drawnM2 = 0;
  let lengthM = 0;
  for (const ring of rings) {
    const points: Point[] = [];
    for (let i = 0; i + 1 < ring.length; i += 2) points.push({ xM: ring[i]!, yM: ring[i + 1]! });
    drawnM2 += signedAreaM2(points);
    lengthM += points.reduce(
      (sum, p, i) => sum + Math.hypot(p.xM - (points[i + 1] ?? p).xM, p.yM - (points[i + 1] ?? p).yM),
      0,
    );
  }
  expect(Math.abs(drawnM2 - areaM2)).toBeLessThanOrEqual(0.5 * cellM * lengthM + cellM ** 2);
}

test('a place seen along the shore is not blocked by the shore it stands on', () => {
  const stance = at(50, 0.3);
  for (const bearingDeg of [275, 300, 0, 60, 85]) {
    expect(reachFrom(pond, stance)(pointAlong(stance.at, bearingDeg, 40)).inSight).toBe(true);
  }
});
