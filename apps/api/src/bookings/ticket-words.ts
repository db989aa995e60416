import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import { cancellationSteps } from '@mereward/shared/bookings/cancellation-words';
import type { BookedPeg } from '@mereward/shared/bookings/contract';
import { licenceNeeded } from '@mereward/shared/bookings/rod-licence';
import { moneyWords } from '@mereward/shared/money/money';
import { dayAndClock } from '@mereward/shared/time/day-names';
import { currencyOf } from '../payments/currency';
import type { TicketPaper } from './ticket-paper';

/** An instant by a zone’s clock with the clock’s name: "Sat 27 March 2027, 12:00 GMT". */
export function zonedWords(at: Date, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', { timeZone: zone, timeZoneName: 'short' }).formatToParts(at);
  const name = parts.find(({ type }) => type === 'timeZoneName')?.value ?? zone;
  return `${dayAndClock(at.toISOString(), zone)} ${name}`;
}

export type Fact = readonly [what: string, is: string];

const fact = (what: string, is: string): Fact[] => (is === '' ? [] : [[what, is]]);
const counted = (count: number, one: string, more: string): string => `${count} ${count === 1 ? one : more}`;
const pegWords = ({ number, name }: BookedPeg): string => (name === '' ? number : `${number} (${name})`);

/** Where it is good: its pegs, or that one is chosen on arrival. */
export function placeWords({ pegs, roving, lakeName, fisheryName }: TicketPaper): string {
  const where = lakeName ?? `every lake of ${fisheryName}`;
  const named = [...new Set(pegs.map(pegWords))];
  const chosen = named.length > 0 ? `peg ${named.join(', ')}` : '';
  const open = roving > 0 ? `${counted(roving, 'peg', 'pegs')} to be chosen on arrival` : '';
  return [where, chosen, open].filter(Boolean).join(', ');
}

/** Who, where and when. */
export function ticketFacts(paper: TicketPaper): Fact[] {
  const { zone, from, until, holder, people, rods, details } = paper;
  const names = [...new Set(details.tickets.map(({ name }) => name).filter(Boolean))];
  return [
    ...fact('Ticket', details.ticketName),
    ...fact('Where', placeWords(paper)),
    ['From', zonedWords(from, zone)],
    ['Until', zonedWords(until, zone)],
    ['Holder', holder],
    ...(names.length > 1 || (names[0] ?? holder) !== holder ? fact('Anglers', names.join(', ')) : []),
    ['For', `${counted(people, 'person', 'people')}, ${counted(rods, 'rod', 'rods')}`],
    ...fact('Responsible adult', details.guardian?.name ?? ''),
    ...fact('Vehicle', details.vehicle),
  ];
}

/** What it cost line by line with the VAT inside, and what of it is paid. */
export function priceLines(paper: TicketPaper): string[] {
  const { details, grossPence, paidPence, receipts } = paper;
  const money = (pence: number): string => moneyWords(pence, currencyOf(paper.currency));
  if (grossPence === 0 && details.lines.length === 0) return [];
  const lines = details.lines.map(({ words, count, grossPence: gross, vatPence, vatRateBp, vatCode }) => {
    const times = count > 1 ? `${count} × ` : '';
    const vat =
      vatCode === 'standard' || vatCode === 'reduced'
        ? `, VAT at ${vatRateBp / 100} % in it ${money(vatPence)}`
        : VAT_WORDS[vatCode];
    return `${times}${words}: ${money(gross)}${vat}`;
  });
  const due = grossPence - paidPence;
  const paid = paidPence > 0 ? [`Paid: ${money(paidPence)}`] : [];
  const open = due > 0 ? [`Still to be paid: ${money(due)}`] : [];
  const numbers = receipts.length > 0 ? [`Receipt: ${receipts.join(', ')}`] : [];
  return [...lines, [`Altogether: ${money(grossPence)}`, ...paid, ...open, ...numbers].join('. ')];
}

const VAT_WORDS = { zero: ', VAT at 0 %', exempt: ', exempt from VAT', outside_scope: '' } as const;

/** How it may be cancelled, as it was sold. */
export const cancellationLines = ({ details, from, soldAt, zone }: TicketPaper): string[] =>
  cancellationSteps(details.cancellation, { start: from, now: soldAt, zone });

/** Where to come in. The gate’s code is no part of a letter. */
export const gateFacts = ({ fishery, fisheryName }: TicketPaper): Fact[] => [
  ...fact('Address', [fisheryName, fishery.address, fishery.postcode].filter(Boolean).join(', ')),
  ...fact('Open', fishery.opening),
  ...fact('Office', fishery.officeContact),
];

/** Whom to ring and what to say when something has happened. */
export function emergencyFacts(paper: TicketPaper): Fact[] {
  const { pegEmergency: peg, fishery, emergencyAccess, pegs, lakeName, fisheryName } = paper;
  const here = [pegs[0] ? `Peg ${pegs[0].number}` : '', lakeName ?? '', fisheryName];
  return [
    ['Emergency', 'Ring 999 or 112. Reach or throw, don’t go in.'],
    ['Say', peg?.sayThis || here.filter(Boolean).join(', ')],
    ...fact('Grid reference', peg?.gridReference || fishery.gridReference),
    ...fact('Ambulance gate', peg?.ambulanceGate || emergencyAccess),
    ...fact('Meet at', fishery.meetingPoint),
    ...fact('Throw line', peg?.throwLine ?? ''),
    ...fact('Duty phone', fishery.dutyPhone),
  ];
}

/** Cautions that belong on every ticket: the licence and rods left alone, by the law of the place. */
export function cautionLines({ jurisdiction, details }: TicketPaper): string[] {
  const licence = licenceNeeded(jurisdiction, null, details.day);
  const england = jurisdiction === 'ENG' || jurisdiction === 'WAL';
  return [
    `Rod licence: ${licence.words}${licence.link ? ` ${licence.link}` : ''}`,
    england
      ? 'Do not leave rods unattended: in England and Wales it is an offence.'
      : 'Do not leave rods unattended.',
    'Byelaws and notices on the bank come before what is written here.',
  ];
}

export const codeWords = ({ code }: TicketPaper): string => bookingCodeWords(code);
export const factLine = ([what, is]: Fact): string => `${what}: ${is}`;
