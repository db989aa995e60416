import { moneyWords } from '@mereward/shared/money/money';
import { clockIn } from '@mereward/shared/time/day-names';
import { letter, type Letter, type LetterPart, type Words } from '../mail/letter';
import { currencyOf } from '../payments/currency';
import type { TicketPaper } from './ticket-paper';
import {
  cancellationLines,
  cautionLines,
  codeWords,
  emergencyFacts,
  factLine,
  gateFacts,
  placeWords,
  priceLines,
  ticketFacts,
  zonedWords,
} from './ticket-words';

export type Addressed = TicketPaper & { email: string };

const hello = ({ holder }: TicketPaper): string => `Hello ${holder},`;
const openTicket = ({ url }: TicketPaper) => ({ label: 'Open the ticket', url });
const large = (paper: TicketPaper) => ({ label: 'Your code', words: codeWords(paper) });
const part = (title: string, lines: readonly string[]): LetterPart[] =>
  lines.length > 0 ? [{ title, lines }] : [];
const money = (pence: number, paper: TicketPaper): string => moneyWords(pence, currencyOf(paper.currency));

const onTheDay = (paper: TicketPaper): LetterPart[] => [
  ...part('Getting in', gateFacts(paper).map(factLine)),
  ...part('In an emergency', emergencyFacts(paper).map(factLine)),
  ...part('Before you fish', cautionLines(paper)),
];

const stillToDo = ({ notYet }: TicketPaper): LetterPart[] => part('Still to do', notYet);

/** A letter about a ticket with its paper and its place in a calendar, made when it leaves. */
const withTicket = (paper: Addressed, words: Words): Letter => ({
  ...letter(paper.email, words),
  enclosure: { kind: 'ticket', id: paper.id },
});

/** A hold has become a ticket, or the office wrote one. */
export const confirmedLetter = (paper: Addressed, rulesUrl: string): Letter =>
  withTicket(paper, {
    subject: `${paper.fisheryName}: ticket ${codeWords(paper)} is confirmed`,
    lines: [hello(paper), 'Your ticket is confirmed. It is enclosed to print, and for your calendar.'],
    large: large(paper),
    facts: ticketFacts(paper),
    link: openTicket(paper),
    parts: [
      ...stillToDo(paper),
      ...part('Price', priceLines(paper)),
      ...part('If you can’t come', cancellationLines(paper)),
      ...part('Rules', [`The rules in force: ${rulesUrl}`]),
      ...onTheDay(paper),
    ],
  });

/** What is new on the water since the ticket was bought, for the evening before. */
export type Eve = { level: string | null; notices: readonly string[] };

export const tomorrowLetter = (paper: Addressed, { level, notices }: Eve, rulesUrl: string): Letter =>
  withTicket(paper, {
    subject: `${paper.fisheryName}: tomorrow from ${clockIn(paper.zone).format(paper.from)}`,
    lines: [hello(paper), `Your ticket begins tomorrow: ${placeWords(paper)}.`],
    large: large(paper),
    facts: ticketFacts(paper),
    link: openTicket(paper),
    parts: [
      ...stillToDo(paper),
      ...part('Notices', notices),
      ...part('Water level', level === null ? [] : [level]),
      ...part('Rules', [`The rules in force: ${rulesUrl}`]),
      ...onTheDay(paper),
    ],
  });

/** The peg is kept for some minutes more, and nothing was paid. `untilAt`: when it is let go of. */
export const holdEndsLetter = (paper: Addressed, untilAt: Date): Letter =>
  letter(paper.email, {
    subject: `${paper.fisheryName}: kept for you until ${clockIn(paper.zone).format(untilAt)}`,
    lines: [
      hello(paper),
      `${placeWords(paper)} is kept for you until ${zonedWords(untilAt, paper.zone)}. You have no ticket yet.`,
    ],
    link: { label: 'Finish the booking', url: paper.url },
    after: ['Do nothing, and the peg is free for others again. Nothing is taken from you.'],
  });

export const paymentFailedLetter = (paper: Addressed, fault: string): Letter => {
  const { holdUntil } = paper;
  const kept = holdUntil
    ? `The peg is kept for you until ${zonedWords(holdUntil, paper.zone)}: try again, or pay with another card.`
    : 'If you still want to fish, hold a peg anew.';
  return letter(paper.email, {
    subject: `${paper.fisheryName}: the payment did not go through`,
    lines: [
      hello(paper),
      `The payment of ${money(paper.grossPence - paper.paidPence, paper)} for ${placeWords(paper)} did not go through, and you have no ticket yet.`,
      ...(fault === '' ? [] : [fault]),
      kept,
    ],
    link: { label: 'Open the booking', url: paper.url },
    after: ['Nothing was taken. An amount your bank may show as reserved is let go of by the bank.'],
  });
};

/** Where it was, before it was moved; by whom and why. */
export type Moved = { was: string; reason: string; byHolder: boolean };

export const movedLetter = (paper: Addressed, { was, reason, byHolder }: Moved): Letter =>
  withTicket(paper, {
    subject: `${paper.fisheryName}: ticket ${codeWords(paper)} has moved`,
    lines: [
      hello(paper),
      byHolder ? 'You have moved your ticket.' : `${paper.fisheryName} has moved your ticket.`,
      ...(reason === '' ? [] : [`Why: ${reason}`]),
      `It was: ${was}.`,
      'It now is as below. The code and the price stay. The paper and the calendar entry enclosed take the place of the old ones.',
    ],
    large: large(paper),
    facts: ticketFacts(paper),
    link: openTicket(paper),
    parts: [...stillToDo(paper), ...onTheDay(paper)],
  });

/** What goes back by the terms, and how. */
export type Cancelled = { byHolder: boolean; refundPence: number; proposed: boolean; words: string };

export const cancelledLetter = (paper: Addressed, cancelled: Cancelled): Letter =>
  withTicket(paper, {
    subject: `${paper.fisheryName}: ticket ${codeWords(paper)} is cancelled`,
    lines: [
      hello(paper),
      cancelled.byHolder
        ? 'You have cancelled your ticket. It is good no more.'
        : `${paper.fisheryName} has cancelled your ticket. It is good no more.`,
      ...moneyBack(paper, cancelled),
    ],
    facts: ticketFacts(paper),
    link: { label: 'See the booking', url: paper.url },
    after: ['The calendar entry enclosed takes the ticket out of your calendar.'],
  });

function moneyBack(paper: TicketPaper, { refundPence, proposed, words }: Cancelled): string[] {
  if (paper.paidPence === 0) return ['Nothing had been paid for it.'];
  if (refundPence === 0) return [`Nothing goes back. ${words}`];
  const amount = money(refundPence, paper);
  return proposed
    ? [`${amount} is to go back; somebody at the fishery has to approve it first. ${words}`]
    : [`${amount} goes back. ${words} You are told when it is done.`];
}
