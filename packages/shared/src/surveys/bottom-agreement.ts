import type { Bottom, CameBack, CastObservation, Drag, Drop } from './contract';

/** The feels of one cast. */
export type Feels = Pick<CastObservation, 'drop' | 'drag' | 'cameBack' | 'smell'>;

const WEED = ['weed_low', 'weed_thick'] as const;
const SILT = ['silt_firm', 'silt_deep'] as const;

/** Which bottoms each landing goes with; a snag can be met with any. Common practice, no published source. */
const BY_DROP: Readonly<Record<Exclude<Drop, 'unsure'>, readonly Bottom[]>> = {
  soft_slow: [...SILT, 'leaf', 'snag'],
  dull: ['sand', 'clay', 'silt_firm', 'leaf', 'snag'],
  firm_thud: ['gravel', 'clay', 'sand', 'shell', 'snag'],
  sharp_crack: ['gravel', 'clay', 'shell', 'snag'],
  stop_start: [...WEED, 'snag'],
  no_touch: ['weed_thick', 'silt_deep', 'snag'],
};

const BY_DRAG: Readonly<Record<Exclude<Drag, 'unsure'>, readonly Bottom[]>> = {
  smooth_slow_heavy: [...SILT, 'leaf'],
  smooth_skim: ['clay', 'sand'],
  fine_rattle: ['gravel', 'sand'],
  coarse_rattle: ['gravel', 'shell'],
  stick_free_stick: [...WEED, 'leaf'],
  solid_stop: ['snag', 'weed_thick'],
  spongy_pull: [...WEED, 'leaf'],
};

/** Null: tells nothing of the bottom (a scrap of bait; nothing back, which any bottom can give). */
const BY_RETURN: Readonly<Record<CameBack, readonly Bottom[] | null>> = {
  none: null,
  black_silt: [...SILT, 'leaf'],
  grey_clay: ['clay', 'silt_firm'],
  sand: ['sand', 'gravel'],
  weed: WEED,
  leaves: ['leaf', ...SILT],
  twig: ['leaf', 'snag', ...SILT],
  shell: ['shell', 'gravel', 'sand'],
  bait_scrap: null,
  line_or_tackle: null,
};

/** The pairs of feels that no one bottom explains, in words; empty when they agree or fewer than two say anything. */
export function disagreements({ drop, drag, cameBack }: Feels): string[] {
  const said: { name: string; bottoms: readonly Bottom[] }[] = [];
  if (drop !== null && drop !== 'unsure') said.push({ name: 'the landing', bottoms: BY_DROP[drop] });
  if (drag !== null && drag !== 'unsure') said.push({ name: 'the drag', bottoms: BY_DRAG[drag] });
  const returned = (cameBack ?? []).flatMap((thing) => BY_RETURN[thing] ?? []);
  if (returned.length > 0) said.push({ name: 'what came back', bottoms: returned });
  return said.flatMap((one, i) =>
    said
      .slice(i + 1)
      .filter((other) => !one.bottoms.some((bottom) => other.bottoms.includes(bottom)))
      .map((other) => `${one.name} and ${other.name} don’t go together`),
  );
}
