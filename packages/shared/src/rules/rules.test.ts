import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { RuleSheet, type ReadingMode, type Rule } from './contract';
import { goodFrom, readingNeeded, rulesAt, type PublishedSheet } from './reading';
import { changesWords, nextNumber, numberWords, ruleChanges, weightOf } from './rule-changes';
import { wordDifference } from './word-difference';

const id = (number: number): string => `0f1c2b62-7d4e-4a0b-9a38-${String(number).padStart(12, '0')}`;
const rule = (number: number, text: string, more: Partial<Rule> = {}): Rule => ({
  id: id(number),
  number,
  text,
  reason: '',
  category: 'conduct',
  scope: { lakeIds: null, pegIds: null, ticketTypeIds: null },
  basis: 'fishery',
  link: '',
  severity: 'warn',
  ...more,
});

describe('the words that changed', () => {
  test('are told run by run', () => {
    expect(wordDifference('Keepnets are allowed.', 'Keepnets only in matches.')).toEqual([
      { kind: 'same', text: 'Keepnets ' },
      { kind: 'gone', text: 'are' },
      { kind: 'new', text: 'only' },
      { kind: 'same', text: ' ' },
      { kind: 'gone', text: 'allowed.' },
      { kind: 'new', text: 'in matches.' },
    ]);
    expect(wordDifference('', '')).toEqual([]);
  });

  test('joined without what came are the old text, without what went the new one', () => {
    const text = fc
      .array(fc.constantFrom('no', 'nets', 'nets', 'barbless', 'hooks,', ' ', '\n', ' '), { maxLength: 40 })
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(text, text, (before, after) => {
        const runs = wordDifference(before, after);
        const without = (kind: string): string =>
          runs
            .filter((run) => run.kind !== kind)
            .map((run) => run.text)
            .join('');
        expect(without('new')).toBe(before);
        expect(without('gone')).toBe(after);
        if (before === after) expect(runs.every(({ kind }) => kind === 'same')).toBe(true);
        runs.slice(1).forEach((run, index) => expect(run.kind).not.toBe(runs[index]?.kind));
      }),
    );
  });
});

describe('what changed on a sheet', () => {
  const before = [
    rule(3, 'Barbless hooks.'),
    rule(12, 'FO3 is open.', { category: 'safety' }),
    rule(19, 'Keepnets are allowed.'),
  ];

  test('is told in the order of the rules and counted in words', () => {
    const after = [
      rule(3, 'Barbless hooks.'),
      rule(12, 'FO3 closed: overhead line 24 m away.', { category: 'safety', severity: 'remove' }),
      rule(19, 'Keepnets only in matches.'),
    ];
    const changes = ruleChanges(before, after);
    expect(changes.map((each) => (each.kind === 'changed' ? each.fields : each.kind))).toEqual([
      ['text', 'severity'],
      ['text'],
    ]);
    expect(changesWords(changes)).toBe('2 rules changed');
    expect(weightOf(changes)).toEqual({ least: 'change', suggested: 'safety' });
    expect(ruleChanges(before, [...before].reverse())).toEqual([]);
  });

  test('a rule added or taken away is no wording put right', () => {
    const changes = ruleChanges(before, [...before.slice(1), rule(20, 'Dogs on a lead.')]);
    expect(changesWords(changes)).toBe('1 rule added and 1 taken away');
    expect(weightOf(changes)).toEqual({ least: 'change', suggested: 'change' });
    const typo = ruleChanges(before, [rule(3, 'Barbless hooks!'), ...before.slice(1)]);
    expect(weightOf(typo)).toEqual({ least: 'minor', suggested: 'minor' });
    expect(changesWords([])).toBe('No rule changed');
  });

  test('the next version is a point more for a wording, a whole one for a change', () => {
    const six = { major: 6, minor: 0 };
    expect(numberWords(nextNumber(six, 'safety'))).toBe('7');
    expect(numberWords(nextNumber(nextNumber(six, 'change'), 'minor'))).toBe('7.1');
    expect(numberWords(nextNumber(null, 'minor'))).toBe('1');
  });
});

describe('who must read again', () => {
  const sheet = (
    major: number,
    minor: number,
    weight: PublishedSheet['weight'],
    publishedAt: string,
  ): PublishedSheet => ({
    major,
    minor,
    weight,
    publishedAt: new Date(publishedAt),
  });
  const six = sheet(6, 0, 'change', '2027-01-01T09:00:00Z');
  const seven = sheet(7, 0, 'safety', '2027-07-01T09:00:00Z');
  const typo = sheet(7, 1, 'minor', '2027-07-03T09:00:00Z');
  const eight = sheet(8, 0, 'change', '2027-07-10T09:00:00Z');
  const valid: ReadingMode = 'must_ack_before_ticket_valid';
  const bookedAt = new Date('2027-06-20T09:00:00Z');

  test('a safety-critical version asks everybody, and the ticket hangs on it', () => {
    expect(readingNeeded([six], { read: { major: 6, minor: 0 }, bookedAt }, valid).needed).toBe(false);
    expect(readingNeeded([seven, six], { read: { major: 6, minor: 0 }, bookedAt }, valid)).toEqual({
      needed: true,
      blocks: 'ticket',
      version: { major: 7, minor: 0 },
      since: { major: 6, minor: 0 },
    });
    expect(readingNeeded([six, seven, typo], { read: { major: 6, minor: 0 }, bookedAt }, valid).needed).toBe(
      true,
    );
  });

  test('a wording put right asks nobody, a change those who book after it', () => {
    const read = { major: 7, minor: 0 };
    expect(readingNeeded([six, seven, typo], { read, bookedAt }, valid).needed).toBe(false);
    expect(readingNeeded([six, seven, typo, eight], { read, bookedAt }, valid).needed).toBe(false);
    const later = new Date('2027-07-11T09:00:00Z');
    expect(readingNeeded([six, seven, typo, eight], { read, bookedAt: later }, valid).needed).toBe(true);
  });

  test('who has read none reads the newest, and nothing is asked where there is no sheet', () => {
    expect(readingNeeded([six, seven], { read: null, bookedAt }, 'must_ack_before_arrival')).toMatchObject({
      needed: true,
      blocks: 'arrival',
      since: null,
    });
    expect(readingNeeded([six], { read: null, bookedAt }, 'notice_only')).toMatchObject({
      needed: true,
      blocks: 'nothing',
    });
    expect(readingNeeded([], { read: null, bookedAt }, valid)).toEqual({
      needed: false,
      blocks: 'nothing',
      version: null,
      since: null,
    });
  });

  test('rules read out on the bank make the ticket good from then', () => {
    const start = new Date('2027-07-17T11:00:00Z');
    const readOut = new Date('2027-07-17T20:52:00Z');
    expect(goodFrom(start, readOut, valid)).toEqual(readOut);
    expect(goodFrom(start, readOut, 'notice_only')).toEqual(start);
    expect(goodFrom(start, bookedAt, valid)).toEqual(start);
  });
});

test('a rule holds where its scope reaches, and a sheet has no number twice', () => {
  const scope = { lakeIds: [id(901)], pegIds: [id(903)], ticketTypeIds: null };
  const rules = [rule(2, 'No fishing here.', { scope }), rule(1, 'Barbless hooks.')];
  const at = (pegId: string) => ({ lakeId: id(901), pegId, ticketTypeId: null });
  expect(rulesAt(rules, at(id(903))).map(({ number }) => number)).toEqual([1, 2]);
  expect(rulesAt(rules, at(id(904))).map(({ number }) => number)).toEqual([1]);
  expect(RuleSheet.safeParse({ rules }).success).toBe(true);
  const twice = RuleSheet.safeParse({
    rules: [rule(1, 'One.'), { ...rule(2, 'Two.'), number: 1 }, rule(2, 'Three.')],
  });
  expect(twice.error?.issues.map(({ path }) => path.join('.'))).toEqual(['rules.1.number', 'rules.2.id']);
});
