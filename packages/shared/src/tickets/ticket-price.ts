import { moneyWords, sumPence } from '../money/money';
import { vatLine } from '../money/vat';
import { dayAndClock } from '../time/day-names';
import type { PriceLineView, TicketChoice, TicketPrice, TicketType } from './contract';
import { ticketInterval, type LakePlace, type Refusal } from './ticket-interval';

/** The price in force for a day fished: the latest that began on or before it; null before the first. */
export function priceOn(prices: readonly TicketPrice[], day: string): TicketPrice | null {
  const begun = prices.filter(({ fromDay }) => fromDay <= day);
  return begun.reduce<TicketPrice | null>(
    (latest, each) => (latest === null || each.fromDay > latest.fromDay ? each : latest),
    null,
  );
}

type Priced = Pick<TicketType, 'name' | 'prices' | 'rodsIncluded'>;

/**
 * What a ticket costs, line by line, VAT rounded for each line. The price is that of the day fished. Refused where no
 * price has begun by then. Whether so many rods or people are allowed is `whyNotSell`'s to say.
 */
export function priceLines(type: Priced, choice: TicketChoice): PriceLineView[] | Refusal {
  const price = priceOn(type.prices, choice.day);
  if (!price) return { refused: 'No price is set for that day yet. Ask the fishery.' };
  const extraRods = Math.max(0, choice.rods - type.rodsIncluded);
  const extraPeople = Math.max(0, choice.people - 1);
  const line = (words: string, count: number, eachPence: number): PriceLineView[] => {
    if (count === 0) return [];
    const { grossPence, netPence, vatPence } = vatLine(count * eachPence, price.vatRateBp);
    const { vatCode, vatRateBp } = price;
    return [{ words, count, grossPence, netPence, vatPence, vatCode, vatRateBp }];
  };
  return [
    ...line(type.name, 1, price.pricePence),
    ...line(extraRods === 1 ? 'Extra rod' : 'Extra rods', extraRods, price.extraRodPence),
    ...line(extraPeople === 1 ? 'Second person' : 'Further people', extraPeople, price.extraPersonPence),
  ];
}

export const grossOf = (lines: readonly PriceLineView[]): number =>
  sumPence(lines.map(({ grossPence }) => grossPence));

/** “24 hours from Sat 17 July 2027, 12:00 would cost £28.00 and end Sun 18 July 2027, 12:00.” */
export function ticketForetold(
  type: Priced & Pick<TicketType, 'duration' | 'currency'>,
  choice: TicketChoice,
  place: LakePlace,
): string {
  const hours = ticketInterval(type.duration, choice, place);
  if ('refused' in hours) return hours.refused;
  const lines = priceLines(type, choice);
  if ('refused' in lines) return lines.refused;
  const [from, until] = [hours.from, hours.until].map((at) => dayAndClock(at.toISOString(), place.zone));
  return `${type.name} from ${from} would cost ${moneyWords(grossOf(lines), type.currency)} and end ${until}.`;
}
