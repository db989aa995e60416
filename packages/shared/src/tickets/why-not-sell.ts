import { ageOnDay } from '../time/age';
import { civilDay } from '../time/civil-day';
import { dayAndClock, dayName } from '../time/day-names';
import { overlaps, type Interval } from '../time/interval';
import { addDays, daysBetween, HOUR_MS } from '../time/zoned';
import type { TicketChoice, TicketType } from './contract';
import { nightsInARow, nightsIn } from './nights';

/** What is known of the person who is to fish. `stays` are their other bookings at this fishery, held or confirmed. */
export type Angler = {
  member: boolean;
  staff: boolean;
  inMatch: boolean; // named by the organiser of a match
  bornOn: string | null; // civil day
  stays: readonly Interval[];
  bookingsToCome: number; // of this kind of ticket
  hostStays: readonly Interval[] | null; // of the member who brings them as a guest; null without one
  concessionSeen: boolean;
  guardian: 'none' | 'named' | 'near'; // near: on the same or the next peg for all of it
  vehicle: boolean;
  emergencyContact: boolean;
};

/** What is asked for: the choice, the hours it comes to, the lake's rule on nights, and now. */
export type Asked = { choice: TicketChoice; hours: Interval; lakeNights: boolean; zone: string; now: Date };

export type SellFault = { code: string; words: string };

/** Every reason, all at once, why this ticket can't be sold to this person for this day; none when it can. */
export function whyNotSell(type: TicketType, angler: Angler, asked: Asked): SellFault[] {
  return [
    ...dayFaults(type, asked),
    ...noticeFaults(type, asked),
    ...audienceFaults(type, angler, asked),
    ...ageFaults(type, angler, asked),
    ...nightFaults(type, angler, asked),
    ...countFaults(type, angler, asked),
    ...missingFaults(type, angler),
  ];
}

const when = (wrong: boolean, code: string, words: string): SellFault[] => (wrong ? [{ code, words }] : []);

function dayFaults({ firstDay, lastDay }: TicketType, { choice: { day } }: Asked): SellFault[] {
  return [
    ...when(
      firstDay !== null && day < firstDay,
      'not-yet-sold',
      `This ticket is for days from ${dayName(firstDay ?? day)}.`,
    ),
    ...when(
      lastDay !== null && day > lastDay,
      'no-longer-sold',
      `This ticket was for days up to ${dayName(lastDay ?? day)}.`,
    ),
  ];
}

function noticeFaults(type: TicketType, { choice, hours, zone, now }: Asked): SellFault[] {
  const ahead = daysBetween(civilDay(now, zone), choice.day);
  const latest = new Date(hours.from.getTime() - type.leastNoticeHours * HOUR_MS);
  const opens = addDays(choice.day, -type.mostNoticeDays);
  if (now >= hours.until) return [{ code: 'over', words: 'That time is over. Choose a later one.' }];
  return [
    ...when(
      type.leastNoticeHours > 0 && now > latest,
      'too-late',
      `This ticket is sold up to ${type.leastNoticeHours} hours before it starts: that was ${dayAndClock(latest.toISOString(), zone)}.`,
    ),
    ...when(
      ahead > type.mostNoticeDays && type.duration.kind !== 'season',
      'too-early',
      `This ticket is sold from ${type.mostNoticeDays} days before. Come back on ${dayName(opens)}.`,
    ),
  ];
}

function audienceFaults({ audience }: TicketType, angler: Angler, { hours }: Asked): SellFault[] {
  switch (audience) {
    case 'public':
    case 'junior': // the ages decide
    case 'concession': // the proof decides
      return [];
    case 'member':
      return when(!angler.member, 'members-only', 'This ticket is for members.');
    case 'staff':
      return when(!angler.staff, 'staff-only', 'This ticket is for the fishery’s own people.');
    case 'match':
      return when(
        !angler.inMatch,
        'match-only',
        'This ticket comes with a place in a match. Ask its organiser.',
      );
    case 'guest':
      if (angler.hostStays === null)
        return [{ code: 'no-host', words: 'A guest ticket needs the member who brings you.' }];
      return when(
        !angler.hostStays.some((stay) => overlaps(stay, hours)),
        'host-not-there',
        'The member who brings you has no ticket for that time. They must book first.',
      );
  }
}

function ageFaults(type: TicketType, angler: Angler, { choice: { day } }: Asked): SellFault[] {
  const { leastAge, mostAge, guardianBelowAge } = type.ages;
  if (leastAge === null && mostAge === null && guardianBelowAge === null) return [];
  if (angler.bornOn === null)
    return when(
      leastAge !== null || mostAge !== null || type.audience === 'junior',
      'age-unknown',
      'This ticket depends on age. Give the date of birth.',
    );
  const age = ageOnDay(angler.bornOn, day);
  const then = `Age on ${dayName(day)} is ${age}.`;
  const unguarded = guardianBelowAge !== null && age < guardianBelowAge;
  return [
    ...when(
      leastAge !== null && age < leastAge,
      'too-young',
      `${then} This ticket is for ${leastAge} and over.`,
    ),
    ...when(mostAge !== null && age > mostAge, 'too-old', `${then} This ticket is for ${mostAge} and under.`),
    ...when(
      unguarded && angler.guardian === 'none',
      'no-guardian',
      `${then} Under ${guardianBelowAge} a guardian must be named.`,
    ),
    ...when(
      unguarded && angler.guardian === 'named',
      'guardian-not-near',
      `${then} Under ${guardianBelowAge} the guardian must be on the same or the next peg all the time.`,
    ),
  ];
}

function nightFaults(type: TicketType, angler: Angler, { hours, lakeNights, zone }: Asked): SellFault[] {
  if (type.duration.kind === 'season') return [];
  const most = type.mostNightsInARow;
  const nights = nightsInARow(hours, angler.stays, { restHours: type.restHours, zone });
  const rest = type.restHours > 0 ? ` Then ${type.restHours} hours off the water are needed.` : '';
  return [
    ...when(
      !lakeNights && nightsIn(hours, zone) > 0,
      'no-nights',
      'There is no night fishing on this lake. Choose a ticket that ends the same day.',
    ),
    ...when(
      most !== null && nights > most,
      'too-many-nights',
      `With your other bookings this makes ${nights} nights in a row; at most ${most} are allowed.${rest}`,
    ),
  ];
}

function countFaults(type: TicketType, angler: Angler, { choice }: Asked): SellFault[] {
  return [
    ...when(
      choice.rods > type.rodsMost,
      'too-many-rods',
      `At most ${type.rodsMost} rods go with this ticket.`,
    ),
    ...when(
      choice.people > type.peopleMost,
      'too-many-people',
      type.peopleMost === 1
        ? 'This ticket is for one person.'
        : `This ticket is for at most ${type.peopleMost} people.`,
    ),
    ...when(
      type.mostBookings !== null && angler.bookingsToCome >= type.mostBookings,
      'too-many-bookings',
      `You have ${angler.bookingsToCome} of these still to come; at most ${type.mostBookings ?? 0} can be held at once.`,
    ),
  ];
}

function missingFaults(type: TicketType, angler: Angler): SellFault[] {
  return [
    ...when(
      type.concessionProof !== '' && !angler.concessionSeen,
      'no-proof',
      `This price needs to be shown once: ${type.concessionProof}.`,
    ),
    ...when(
      type.needs.vehicle && !angler.vehicle,
      'no-vehicle',
      'Give the vehicle you come with, or say that you come without.',
    ),
    ...when(
      type.needs.emergencyContact && !angler.emergencyContact,
      'no-emergency-contact',
      'Name somebody to ring in an emergency.',
    ),
  ];
}
