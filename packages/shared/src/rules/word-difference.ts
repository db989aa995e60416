/** A run of words that stayed, went or came. The spaces and line ends between words belong to the runs. */
export type WordRun = { kind: 'same' | 'gone' | 'new'; text: string };

/** Words, and the spaces between them as pieces of their own, so that joined they are the text again. */
const pieces = (text: string): string[] => text.match(/\s+|\S+/g) ?? [];

/**
 * What changed between two texts, word by word: runs in reading order, what went before what came. The `same` and
 * `gone` runs joined are `before`, the `same` and `new` ones `after`, to the letter. A longest common subsequence by
 * dynamic programming: time and room grow as the product of the two counts of words, for texts of a page at most.
 * Source: R. Wagner and M. Fischer, The String-to-String Correction Problem, 1974.
 */
export function wordDifference(before: string, after: string): WordRun[] {
  const [old, fresh] = [pieces(before), pieces(after)];
  const lengths = commonLengths(old, fresh);
  const width = fresh.length + 1;
  const runs: WordRun[] = [];
  const add = (kind: WordRun['kind'], text: string): void => {
    const last = runs.at(-1);
    if (last?.kind === kind) last.text += text;
    else runs.push({ kind, text });
  };
  let [i, j] = [0, 0];
  while (i < old.length || j < fresh.length) {
    const [gone, came] = [old[i], fresh[j]];
    if (gone !== undefined && gone === came) {
      add('same', gone);
      i += 1;
      j += 1;
    } else if (
      gone !== undefined &&
      (came === undefined || lengthAt(lengths, (i + 1) * width + j) >= lengthAt(lengths, i * width + j + 1))
    ) {
      add('gone', gone);
      i += 1;
    } else {
      add('new', came ?? '');
      j += 1;
    }
  }
  return runs;
}

const lengthAt = (lengths: Uint16Array, index: number): number => lengths[index] ?? 0;

/** Row-major, (old + 1) × (new + 1): the length of what the rest from i and the rest from j have in common. */
function commonLengths(old: readonly string[], fresh: readonly string[]): Uint16Array {
  const width = fresh.length + 1;
  const lengths = new Uint16Array((old.length + 1) * width);
  for (let i = old.length - 1; i >= 0; i -= 1) {
    for (let j = fresh.length - 1; j >= 0; j -= 1) {
      lengths[i * width + j] =
        old[i] === fresh[j]
          ? lengthAt(lengths, (i + 1) * width + j + 1) + 1
          : Math.max(lengthAt(lengths, (i + 1) * width + j), lengthAt(lengths, i * width + j + 1));
    }
  }
  return lengths;
}
