import type { Rule, RuleCategory, SheetNumber } from '@mereward/shared/rules/contract';
import { numberWords } from '@mereward/shared/rules/rule-changes';
import type { Paper } from '@/components/paper-buttons';
import type { ReadingView } from '@mereward/shared/rules/sheet-contract';

export const CATEGORY_WORDS: Readonly<Record<RuleCategory, string>> = {
  safety: 'Safety',
  fish_welfare: 'Care of the fish',
  tackle: 'Tackle',
  bait: 'Bait',
  conduct: 'Conduct',
  access: 'Access',
  juniors: 'Juniors',
  night: 'Night',
  boats: 'Boats',
  cars: 'Cars',
  matches: 'Matches',
};

export const SEVERITY_WORDS: Readonly<Record<Rule['severity'], string>> = {
  warn: 'A warning',
  remove: 'Being asked to leave',
  ban: 'A ban',
};

export const BASIS_WORDS: Readonly<Record<Rule['basis'], string>> = {
  byelaw: 'Byelaw',
  fishery: 'Rule of this fishery',
  advice: 'Advice',
};

export const METHOD_WORDS: Readonly<Record<ReadingView['method'], string>> = {
  online: 'read on a screen',
  paper: 'signed on paper',
  verbal: 'read out',
};

export const versionWords = (number: SheetNumber): string => `Version ${numberWords(number)}`;

/** How somebody read a version: "read out, witness Tom Wragg". */
export const readingWords = ({ method, witness }: Pick<ReadingView, 'method' | 'witness'>): string =>
  witness === null ? METHOD_WORDS[method] : `${METHOD_WORDS[method]}, witness ${witness}`;

/** Under a rule: where it comes from, and what breaking it may lead to. */
export const ruleNote = ({ category, basis, severity }: Rule): string =>
  [
    CATEGORY_WORDS[category],
    BASIS_WORDS[basis],
    `Breaking it: ${SEVERITY_WORDS[severity].toLowerCase()}`,
  ].join(' · ');

/** A version to print, plain and large. */
export const sheetPapers = ({ id, ...number }: SheetNumber & { id: string }): Paper[] => {
  const name = `rules-${numberWords(number)}`;
  return [
    { label: 'Print', path: `/rule-sheets/${id}/sheet.pdf`, name: `${name}.pdf` },
    { label: 'Large print', path: `/rule-sheets/${id}/sheet.pdf?print=large`, name: `${name}-large.pdf` },
  ];
};
