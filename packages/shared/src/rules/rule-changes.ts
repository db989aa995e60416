import type { ChangeWeight, Rule, SheetNumber } from './contract';
import { wordDifference, type WordRun } from './word-difference';

/** What happened to one rule between two versions of a sheet. */
export type RuleChange =
  | { kind: 'added'; rule: Rule }
  | { kind: 'removed'; rule: Rule }
  | { kind: 'changed'; before: Rule; after: Rule; words: WordRun[]; fields: ChangedField[] };

export type ChangedField =
  'number' | 'text' | 'reason' | 'category' | 'scope' | 'basis' | 'link' | 'severity';
const FIELDS: readonly ChangedField[] = [
  'number',
  'text',
  'reason',
  'category',
  'scope',
  'basis',
  'link',
  'severity',
];

/** Every rule that is not as it was, in the order of the numbers, with its words before and after. Told by rule id. */
export function ruleChanges(before: readonly Rule[], after: readonly Rule[]): RuleChange[] {
  const old = new Map(before.map((rule) => [rule.id, rule]));
  const kept = new Set(after.map(({ id }) => id));
  const changes: RuleChange[] = after.flatMap((rule): RuleChange[] => {
    const was = old.get(rule.id);
    if (!was) return [{ kind: 'added', rule }];
    const fields = FIELDS.filter((field) => !same(was[field], rule[field]));
    if (fields.length === 0) return [];
    return [
      { kind: 'changed', before: was, after: rule, words: wordDifference(was.text, rule.text), fields },
    ];
  });
  const removed = before
    .filter(({ id }) => !kept.has(id))
    .map((rule): RuleChange => ({ kind: 'removed', rule }));
  return [...changes, ...removed].sort((a, b) => numberOf(a) - numberOf(b));
}

/** Rules are plain values; a list of ids is the same in another order. */
const same = (a: Rule[ChangedField], b: Rule[ChangedField]): boolean =>
  JSON.stringify(ordered(a)) === JSON.stringify(ordered(b));
const ordered = (value: Rule[ChangedField]): unknown =>
  typeof value === 'object'
    ? [value.lakeIds, value.pegIds, value.ticketTypeIds].map((ids) => ids && [...ids].sort())
    : value;

export const ruleOf = (change: RuleChange): Rule => (change.kind === 'changed' ? change.after : change.rule);
const numberOf = (change: RuleChange): number => ruleOf(change).number;

/** “2 rules changed”, “1 rule added and 1 taken away”: for a letter’s subject and over the list. */
export function changesWords(changes: readonly Pick<RuleChange, 'kind'>[]): string {
  const parts = (
    [
      ['changed', 'changed'],
      ['added', 'added'],
      ['removed', 'taken away'],
    ] as const
  ).flatMap(([kind, words]) => {
    const count = changes.filter((each) => each.kind === kind).length;
    return count === 0 ? [] : [{ count, words }];
  });
  const [first, ...rest] = parts;
  if (!first) return 'No rule changed';
  const head = `${first.count} ${first.count === 1 ? 'rule' : 'rules'} ${first.words}`;
  const tail = rest.map(({ count, words }) => `${count} ${words}`);
  const last = tail.pop();
  return last === undefined ? head : `${[head, ...tail].join(', ')} and ${last}`;
}

/**
 * The least weight a new version may be published with. Only words, reasons and links may be put right as minor; a rule
 * added, taken away, renumbered, or of another scope, severity, basis or category is a change. `suggested` is safety
 * where a rule of that category is touched by more than its words: a person decides.
 */
export function weightOf(changes: readonly RuleChange[]): {
  least: 'minor' | 'change';
  suggested: ChangeWeight;
} {
  const slight = (change: RuleChange): boolean =>
    change.kind === 'changed' &&
    change.fields.every((field) => field === 'text' || field === 'reason' || field === 'link');
  const least = changes.every(slight) ? 'minor' : 'change';
  const touched = changes.some(
    (change) => !slight(change) && (ruleOf(change).category === 'safety' || wasSafety(change)),
  );
  return { least, suggested: touched ? 'safety' : least };
}

const wasSafety = (change: RuleChange): boolean =>
  change.kind === 'changed' && change.before.category === 'safety';

/** The number of the version after: 7 → 7.1 for a wording put right, 8 for anything more; 1 for the first. */
export function nextNumber(current: SheetNumber | null, weight: ChangeWeight): SheetNumber {
  if (!current) return { major: 1, minor: 0 };
  return weight === 'minor'
    ? { major: current.major, minor: current.minor + 1 }
    : { major: current.major + 1, minor: 0 };
}

export const numberWords = ({ major, minor }: SheetNumber): string =>
  minor === 0 ? `${major}` : `${major}.${minor}`;
