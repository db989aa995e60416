import type { Account } from '@mereward/db/entities/accounts/account';
import { clockIn, dayAndClock } from '@mereward/shared/time/day-names';
import type { Interval } from '@mereward/shared/time/interval';
import type { Ctx } from '../ctx';
import { letter } from '../mail/letter';
import type { Occasion } from './occasion';

type Offer = { occasion: Occasion; account: Account; bookingId: string; window: Interval };

/** Tells who waited that a place is theirs for a while. It leaves when their time begins: never in the quiet hours. */
export async function postOffer(
  { tx, jobs, now, publicUrl }: Ctx,
  { occasion, account, bookingId, window }: Offer,
): Promise<void> {
  const { zone, lake, fisheryName, hours, tickets } = occasion;
  const peg = tickets[0]?.peg;
  const what = peg ? `Peg ${peg.number} on ${lake.name}` : `A place on ${lake.name}`;
  const until = dayAndClock(window.until.toISOString(), zone);
  const payload = letter(account.email, {
    subject: `${fisheryName}: ${what} is free for you until ${clockIn(zone).format(window.until)}`,
    lines: [
      `Hello ${account.name},`,
      `You were waiting, and it is your turn: ${what} has come free.`,
      `${hours.words}.`,
      `It is kept for you until ${until}. Finish the booking by then, and it is yours.`,
    ],
    link: { label: 'Finish the booking', url: `${publicUrl}/tickets/bookings/${bookingId}` },
    after: [
      'Do nothing, and it goes to the next in line. Your own place in the line is kept for another peg.',
    ],
  });
  const afterSeconds = Math.max(0, (window.from.getTime() - now.getTime()) / 1000);
  await jobs.later(tx, { name: 'mail.send', payload, afterSeconds });
}
