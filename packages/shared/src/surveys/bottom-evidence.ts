import { Cover, CoverShares, Substrate, SubstrateShares } from './contract';
import { bottomCall, KNOCK_WORDS, type BottomCall, type ThrownLine } from './bottom-call';
import { disagreements, type Feels } from './bottom-agreement';
import {
  COVER_LIKELIHOODS,
  SUBSTRATE_LIKELIHOODS,
  type Likelihoods,
  type LikelihoodTable,
} from './bottom-likelihoods';

export type BottomTables = {
  substrate: LikelihoodTable<Substrate>;
  cover: LikelihoodTable<Cover>;
};

export const USUAL_TABLES: BottomTables = { substrate: SUBSTRATE_LIKELIHOODS, cover: COVER_LIKELIHOODS };

/** What one cast says of the bottom. Shares are null when nothing was felt and nobody looked. */
export type BottomEvidence = {
  substrate: SubstrateShares | null;
  cover: CoverShares | null;
  bottom: BottomCall['bottom'];
  words: string;
  askAgain: boolean; // two of the feels disagree: cast again a metre or two away
};

/**
 * Two answers from the feels of one cast by naive Bayes, each a probability over its classes, and the label by the
 * surveyor's rule. Missing evidence is missing: "unsure", not looked and not felt cast no vote.
 */
export function bottomEvidence(
  feels: Feels,
  casts: { here: ThrownLine; earlier: readonly ThrownLine[] },
  tables: BottomTables = USUAL_TABLES,
): BottomEvidence {
  const clashes = disagreements(feels);
  const { bottom, why } = bottomCall(feels, casts.here, casts.earlier);
  const words = [why];
  if (knockAlone(feels) && why !== KNOCK_WORDS) words.push(KNOCK_WORDS);
  if (clashes.length > 0) words.push(`${sentence(clashes)}; cast again 1–2 m away`);
  const felt = saysAnything(feels);
  return {
    substrate: felt
      ? SubstrateShares.parse(Object.fromEntries(posterior(Substrate.options, feels, tables.substrate)))
      : null,
    cover: felt ? CoverShares.parse(Object.fromEntries(posterior(Cover.options, feels, tables.cover))) : null,
    bottom,
    words: `${words.join('. ')}.`,
    askAgain: clashes.length > 0,
  };
}

/** A hard landing with nothing drawn and nothing brought back that could split gravel from clay. */
function knockAlone({ drop, drag, cameBack }: Feels): boolean {
  const knock = drop === 'sharp_crack' || drop === 'firm_thud';
  const drawn = drag !== null && drag !== 'unsure';
  const returned = (cameBack ?? []).some((thing) => thing !== 'none');
  return knock && !drawn && !returned;
}

/** P(class | feels) ∝ prior · Π P(feel | class), normalised over `classes` and in their order. */
export function posterior<Class extends string>(
  classes: readonly Class[],
  feels: Feels,
  table: LikelihoodTable<Class>,
): [Class, number][] {
  const logs = classes.map((name) => Math.log(table.prior[name]) + logLikelihood(feels, table.of[name]));
  const top = Math.max(...logs);
  const weights = logs.map((log) => Math.exp(log - top));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return classes.map((name, i) => [name, (weights[i] ?? 0) / total]);
}

export function saysAnything({ drop, drag, cameBack, smell }: Feels): boolean {
  const felt = (drop !== null && drop !== 'unsure') || (drag !== null && drag !== 'unsure');
  return felt || (cameBack !== null && cameBack.length > 0) || smell !== null;
}

function logLikelihood({ drop, drag, cameBack, smell }: Feels, of: Likelihoods): number {
  let log = 0;
  if (drop !== null && drop !== 'unsure') log += Math.log(of.drop[drop]);
  if (drag !== null && drag !== 'unsure') log += Math.log(of.drag[drag]);
  for (const thing of new Set(cameBack ?? [])) log += Math.log(of.cameBack[thing]);
  if (smell !== null) log += Math.log(of.smell[smell]);
  return log;
}

function sentence(clauses: readonly string[]): string {
  const joined = clauses.join(', and ');
  return joined.charAt(0).toUpperCase() + joined.slice(1);
}
