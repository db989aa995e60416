import type { BookingView, FillInBooking } from '@mereward/shared/bookings/contract';
import { licenceNeeded, type LicenceAnswer } from '@mereward/shared/bookings/rod-licence';
import type { Jurisdiction } from '@mereward/shared/fisheries/contract';
import { ageOnDay } from '@mereward/shared/time/age';
import type { TicketType, TicketTypeView } from '@mereward/shared/tickets/contract';
import { z } from 'zod';

/** What a kind of ticket asks of its angler. */
export type Asks = Pick<TicketType, 'ages' | 'needs'>;

/** A booking as its form sees it: each ticket with what its kind asks. */
export type Asked = {
  booking: BookingView;
  jurisdiction: Jurisdiction;
  asks: readonly (Asks | null)[]; // in the order of the tickets; null: the kind is sold no more
};

export const askedOf = (
  booking: BookingView,
  jurisdiction: Jurisdiction,
  kinds: readonly TicketTypeView[],
): Asked => ({
  booking,
  jurisdiction,
  asks: booking.details.tickets.map(
    ({ ticketTypeId }) => kinds.find(({ id }) => id === ticketTypeId)?.details ?? null,
  ),
});

const Day = z.union([z.literal(''), z.iso.date('Choose the day')]);

/** The form's own values; all text, so that half-typed ones can be kept. */
export const DetailsForm = z.object({
  tickets: z.array(z.object({ name: z.string().trim().max(120), bornOn: Day })),
  guardianName: z.string().trim().max(120),
  guardianPhone: z.string().trim().max(40),
  consent: z.boolean(),
  vehicle: z.string().trim().max(20),
  emergencyContact: z.string().trim().max(120),
  licenceHeld: z.boolean(),
  lastSix: z.string().trim().max(6, 'The last six characters at most'),
  licenceUntil: Day,
  note: z.string().trim().max(500),
});
export type DetailsForm = z.infer<typeof DetailsForm>;

const ADULT_AGE = 18;
const ASSUMED_AGE = 30; // of somebody who is not asked for a date of birth: a grown-up

/** Is a date of birth asked on this ticket? */
export const asksBirth = ({ booking, asks }: Asked, index: number): boolean => {
  const kind = booking.details.tickets[index]?.kind;
  const ages = asks[index]?.ages;
  return kind === 'junior' || (ages !== undefined && (ages.leastAge !== null || ages.mostAge !== null));
};

const knownBirth = (text: string): string | null => (z.iso.date().safeParse(text).success ? text : null);

function agesOf(asked: Asked, typed: DetailsForm): (number | null)[] {
  const { day, tickets } = asked.booking.details;
  return tickets.map((_, i) => {
    const bornOn = asksBirth(asked, i) ? knownBirth(typed.tickets[i]?.bornOn ?? '') : null;
    return bornOn === null ? null : ageOnDay(bornOn, day);
  });
}

/** Does anybody on it need a guardian to be named? */
export function needsGuardian(asked: Asked, typed: DetailsForm): boolean {
  const ages = agesOf(asked, typed);
  return asked.booking.details.tickets.some(({ kind }, i) => {
    const age = ages[i] ?? null;
    return age === null ? kind === 'junior' : age < (asked.asks[i]?.ages.guardianBelowAge ?? ADULT_AGE);
  });
}

/** What the law asks of those who fish on it: the strictest answer; null where the fishery asks for no licence. */
export function licenceOf(asked: Asked, typed: DetailsForm): LicenceAnswer | null {
  const { day, tickets } = asked.booking.details;
  const ages = agesOf(asked, typed);
  const answers = tickets.flatMap(({ rods, kind }, i) => {
    if (rods === 0 || asked.asks[i]?.needs.rodLicence === false) return [];
    const age = ages[i] ?? (kind === 'junior' ? null : ASSUMED_AGE);
    return [licenceNeeded(asked.jurisdiction, age, day)];
  });
  return (
    answers.find(({ needed }) => needed === 'yes') ??
    answers.find(({ needed }) => needed === 'ask') ??
    answers[0] ??
    null
  );
}

const some = (asked: Asked, need: 'vehicle' | 'emergencyContact'): boolean =>
  asked.asks.some((kind) => kind?.needs[need] === true);
export const needsVehicle = (asked: Asked): boolean => some(asked, 'vehicle');
export const needsContact = (asked: Asked, typed: DetailsForm): boolean =>
  some(asked, 'emergencyContact') || needsGuardian(asked, typed);

/** The form with everything this booking asks for checked, each fault at its field. */
export const detailsSchema = (asked: Asked) =>
  DetailsForm.superRefine((typed, context) => {
    const fault = (path: (string | number)[], message: string): void =>
      context.addIssue({ code: 'custom', path, message });
    typed.tickets.forEach(({ name, bornOn }, i) => {
      if (name === '') fault(['tickets', i, 'name'], 'Type the name');
      if (asksBirth(asked, i) && bornOn === '')
        fault(['tickets', i, 'bornOn'], 'Give the date of birth: the ticket depends on age');
    });
    if (needsGuardian(asked, typed)) {
      if (typed.guardianName === '') fault(['guardianName'], 'Name who stays with the junior');
      if (typed.guardianPhone === '') fault(['guardianPhone'], 'Give a telephone number');
      if (!typed.consent) fault(['consent'], 'Without the guardian’s agreement a junior can’t be booked');
    }
    if (needsVehicle(asked) && typed.vehicle === '')
      fault(['vehicle'], 'Type the registration, or “none” if you come without');
    if (needsContact(asked, typed) && typed.emergencyContact === '')
      fault(['emergencyContact'], 'Name somebody to ring, with a number');
    if (licenceOf(asked, typed)?.needed === 'yes' && !typed.licenceHeld)
      fault(['licenceHeld'], 'Tick that there is a rod licence, or will be before fishing');
  });

/** What was filled in so far, as the form shows it. */
export function detailsStart({ details }: BookingView): DetailsForm {
  const { tickets, guardian, licence } = details;
  return {
    tickets: tickets.map(({ name, bornOn }) => ({ name, bornOn: bornOn ?? '' })),
    guardianName: guardian?.name ?? '',
    guardianPhone: guardian?.phone ?? '',
    consent: guardian?.consent ?? false,
    vehicle: details.vehicle,
    emergencyContact: details.emergencyContact,
    licenceHeld: licence?.held ?? false,
    lastSix: licence?.lastSix ?? '',
    licenceUntil: licence?.expiresOn ?? '',
    note: details.note,
  };
}

const orNull = (day: string): string | null => (day === '' ? null : day);

export function fillInOf(asked: Asked, typed: DetailsForm): FillInBooking {
  const licence = licenceOf(asked, typed);
  return {
    version: asked.booking.version,
    tickets: typed.tickets.map(({ name, bornOn }, i) => ({
      name,
      bornOn: asksBirth(asked, i) ? orNull(bornOn) : null,
    })),
    guardian: needsGuardian(asked, typed)
      ? { name: typed.guardianName, phone: typed.guardianPhone, consent: typed.consent }
      : null,
    vehicle: typed.vehicle,
    emergencyContact: typed.emergencyContact,
    licence:
      licence === null || licence.needed === 'no'
        ? null
        : { held: typed.licenceHeld, lastSix: typed.lastSix, expiresOn: orNull(typed.licenceUntil) },
    note: typed.note,
  };
}
