import { describe, expect, test } from 'vitest';
import {
  bottomMap,
  chooseBandwidth,
  UNKNOWN_CLASS,
  USUAL_BANDWIDTH_M,
  type BottomEvidence,
} from './bottom-map';

const frame = { columns: 60, rows: 1, cellM: 1, originM: { xM: 0, yM: 0 } };
const nodes = {
  frame,
  nodes: Int32Array.from({ length: 60 }, (_, i) => i),
};
const cast = (xM: number, shares: number[]) => ({ xM, yM: 0, shares });

describe('the bottom between casts', () => {
  test('one certain cast gives (1 + α₀) over (1 + Σα₀) at its place and less with distance, then unknown', () => {
    const map = bottomMap([cast(10, [1, 0, 0, 0, 0])], nodes, 4);
    expect(map.confidence[10]).toBeCloseTo(1.1 / 1.5, 12);
    for (let i = 11; i < 16; i++) expect(map.confidence[i]!).toBeLessThan(map.confidence[i - 1]!);
    expect(map.classes[10]).toBe(0);
    expect(map.classes[25]).toBe(UNKNOWN_CLASS);
    expect(map.confidence[25]).toBe(0);
  });

  test('agreeing casts raise confidence, disagreeing casts lower it', () => {
    const one = bottomMap([cast(10, [0.8, 0.2])], nodes, 4).confidence[10]!;
    const two = bottomMap([cast(10, [0.8, 0.2]), cast(11, [0.8, 0.2])], nodes, 4).confidence[10]!;
    const torn = bottomMap([cast(10, [0.8, 0.2]), cast(11, [0.2, 0.8])], nodes, 4).confidence[10]!;
    expect(two).toBeGreaterThan(one);
    expect(torn).toBeLessThan(one);
  });

  test('no cast leaves everything unknown', () => {
    expect(bottomMap([], nodes, 4).classes.every((kind) => kind === UNKNOWN_CLASS)).toBe(true);
  });

  test('the bandwidth follows the size of the patches', () => {
    const chosenM = (evidence: BottomEvidence[]) => chooseBandwidth(evidence).bandwidthM;
    const patches = (widthM: number) =>
      Array.from({ length: 60 }, (_, i) =>
        cast(2 * i, Math.floor((2 * i) / widthM) % 2 === 0 ? [0.9, 0.1] : [0.1, 0.9]),
      );
    expect(chosenM(patches(10))).toBeLessThan(chosenM(patches(60)));
    expect(chosenM(patches(60))).toBeLessThan(chosenM(patches(120)));
    expect(chosenM(patches(4).slice(0, 9))).toBe(USUAL_BANDWIDTH_M);
  });
});
