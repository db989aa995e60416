import type { RuleChange } from '@mereward/shared/rules/rule-changes';
import { changesWords, numberWords, ruleOf } from '@mereward/shared/rules/rule-changes';
import { letter, type Letter } from '../mail/letter';
import type { Published } from './sheet-view';

type Told = { fishery: string; sheet: Published };

/** To whoever has a booking to come, when a version is published that somebody's safety hangs on. */
export function rulesChangedLetter(
  to: { name: string; email: string },
  { fishery, sheet }: Told,
  url: string,
): Letter {
  const changes = sheet.changes ?? [];
  const what = changes.length > 0 ? changesWords(changes) : 'The rules are new';
  return letter(to.email, {
    subject: `${fishery}: ${what}. Please read before you come`,
    lines: [
      `Hello ${to.name},`,
      `${fishery} has published version ${numberWords(sheet)} of its rules. Somebody’s safety hangs on what changed, so everybody with a ticket is asked to read it again.`,
      ...changes.flatMap(changeLines),
    ],
    link: { label: 'Read what changed', url },
    after: ['It takes a minute. A bailiff can also read the rules to you on the bank.'],
  });
}

/** A change in a letter's words: the text before and after. */
export function changeLines(change: RuleChange): string[] {
  const { number } = ruleOf(change);
  switch (change.kind) {
    case 'added':
      return [`Rule ${number} is new: ${change.rule.text}`];
    case 'removed':
      return [`Rule ${number} is taken away: ${change.rule.text}`];
    case 'changed':
      return change.before.text === change.after.text
        ? [`Rule ${number} stands differently: ${change.after.text}`]
        : [`Rule ${number} was: ${change.before.text}`, `Rule ${number} now is: ${change.after.text}`];
  }
}
