import type { Drag, Drop } from './contract';
import type { Feels } from './bottom-agreement';
import type { LikelihoodTable, Likelihoods } from './bottom-likelihoods';

/** A cast whose bottom was afterwards confirmed by a grab, a pronged lead, a drain-down or a diver. */
export type Confirmed<Class extends string> = { bottom: Class; feels: Feels };

/**
 * The table learnt from confirmed spots: Dirichlet counts, P(feel | class) = (w·P₀ + n) / (w + Σn), where w is how many
 * casts the usual table is worth for each class (default 20: common practice, no published source). The chances
 * before evidence move the same way. Missing feels count for nothing.
 */
export function refineLikelihoods<Class extends string>(
  table: LikelihoodTable<Class>,
  confirmed: readonly Confirmed<Class>[],
  worthCasts = 20,
): LikelihoodTable<Class> {
  if (!(worthCasts > 0)) throw new RangeError('The usual table must be worth more than no cast');
  const classes = Object.keys(table.of).filter((name): name is Class => name in table.prior);
  const prior: Record<Class, number> = { ...table.prior };
  const of: Record<Class, Likelihoods> = { ...table.of };
  for (const name of classes) {
    const feels = confirmed.filter(({ bottom }) => bottom === name).map((spot) => spot.feels);
    of[name] = refineClass(table.of[name], feels, worthCasts);
    prior[name] =
      (worthCasts * classes.length * table.prior[name] + feels.length) /
      (worthCasts * classes.length + confirmed.length);
  }
  return { source: `${table.source}; refined by ${confirmed.length} confirmed spots`, prior, of };
}

function refineClass(usual: Likelihoods, feels: readonly Feels[], worthCasts: number): Likelihoods {
  const drops = feels
    .map(({ drop }) => drop)
    .filter((drop): drop is Exclude<Drop, 'unsure'> => drop !== null && drop !== 'unsure');
  const drags = feels
    .map(({ drag }) => drag)
    .filter((drag): drag is Exclude<Drag, 'unsure'> => drag !== null && drag !== 'unsure');
  const things = feels.flatMap(({ cameBack }) => [...new Set(cameBack ?? [])]);
  const smells = feels.flatMap(({ smell }) => (smell === null ? [] : [smell]));
  return {
    drop: refineRow(usual.drop, drops, worthCasts),
    drag: refineRow(usual.drag, drags, worthCasts),
    cameBack: refineRow(usual.cameBack, things, worthCasts),
    smell: refineRow(usual.smell, smells, worthCasts),
  };
}

function refineRow<Feel extends string>(
  usual: Readonly<Record<Feel, number>>,
  seen: readonly Feel[],
  worthCasts: number,
): Record<Feel, number> {
  const refined: Record<Feel, number> = { ...usual };
  if (seen.length === 0) return refined;
  for (const feel in refined) {
    const times = seen.filter((other) => other === feel).length;
    refined[feel] = (worthCasts * usual[feel] + times) / (worthCasts + seen.length);
  }
  return refined;
}
