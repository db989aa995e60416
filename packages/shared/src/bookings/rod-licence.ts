import { z } from 'zod';
import type { Jurisdiction } from '../fisheries/contract';
import { civilDay } from '../time/civil-day';

/** What an angler says of their licence: the end of its number at most, and until when it is good. */
export const LicenceDeclaration = z.strictObject({
  declared: z.boolean(),
  lastSix: z.string().trim().max(6),
  expiresOn: z.iso.date().nullable(),
});
export type LicenceDeclaration = z.infer<typeof LicenceDeclaration>;

/** What the law of a place asks, as it was read. Dated: a later entry takes over from its day on. */
export type LicenceLaw = {
  jurisdictions: readonly Jurisdiction[];
  fromDay: string; // in force for days from here, as far as this table knows
  neededFromAge: number | null; // from this age on a licence is needed; null: at no age
  unsureFromAge: number | null; // from this age up to that one it depends: ask
  words: string;
  link: string | null;
  checkedOn: string | null; // day on which the page was read; null when it was never opened
};

/**
 * Rod licences by jurisdiction for coarse fish in stillwaters. Law is data: it changes, an owner can be told more by
 * the regulator, and a local byelaw may ask more. Sources: the linked pages, read in part in copies without a date
 * (England, Northern Ireland); the others from memory and marked so by `checkedOn: null`.
 */
export const LICENCE_LAWS: readonly LicenceLaw[] = [
  {
    jurisdictions: ['ENG', 'WAL'],
    fromDay: '2017-04-01',
    neededFromAge: 13,
    unsureFromAge: null,
    words:
      'Anyone of 13 or over needs a rod licence, on private waters too. It is not a ticket, and a ticket is none.',
    link: 'https://www.gov.uk/guidance/national-rod-fishing-byelaws-for-england-freshwater-fishing-with-a-rod-and-line',
    checkedOn: '2026-12-01',
  },
  {
    jurisdictions: ['SCO'],
    fromDay: '2017-04-01',
    neededFromAge: null,
    unsureFromAge: null,
    words: 'No rod licence is needed. The ticket is the owner’s leave to fish.',
    link: null,
    checkedOn: null,
  },
  {
    jurisdictions: ['NIR'],
    fromDay: '2017-04-01',
    neededFromAge: 18,
    unsureFromAge: 0,
    words:
      'A rod licence is needed as well as a permit or day ticket. Juniors have their own: look at the age on the page.',
    link: 'https://www.nidirect.gov.uk/articles/angling-rod-licence-and-permit-regulations-rules',
    checkedOn: '2026-12-01',
  },
  {
    jurisdictions: ['IRL'],
    fromDay: '2017-04-01',
    neededFromAge: null,
    unsureFromAge: null,
    words: 'No State licence is needed for coarse fish.',
    link: null,
    checkedOn: null,
  },
];

export type LicenceAnswer = {
  needed: 'yes' | 'no' | 'ask';
  words: string;
  link: string | null;
  checkedOn: string | null;
};

/**
 * Whether somebody of an age (whole years on the day fished, null when unknown) needs a rod licence. `ask` where no law
 * is known for the place or the day. An answer to warn by, never to refuse by: a licence can be bought the same day.
 */
export function licenceNeeded(jurisdiction: Jurisdiction, age: number | null, day: string): LicenceAnswer {
  const law = LICENCE_LAWS.filter(
    (each) => each.jurisdictions.includes(jurisdiction) && each.fromDay <= day,
  ).reduce<LicenceLaw | null>(
    (latest, each) => (latest === null || each.fromDay > latest.fromDay ? each : latest),
    null,
  );
  if (!law)
    return {
      needed: 'ask',
      words: 'Ask the fishery which licence or card is needed here.',
      link: null,
      checkedOn: null,
    };
  const { words, link, checkedOn } = law;
  return { needed: neededAt(law, age), words, link, checkedOn };
}

function neededAt({ neededFromAge, unsureFromAge }: LicenceLaw, age: number | null): LicenceAnswer['needed'] {
  if (neededFromAge === null) return 'no';
  if (age === null) return 'ask';
  if (age >= neededFromAge) return 'yes';
  return unsureFromAge !== null && age >= unsureFromAge ? 'ask' : 'no';
}

/** Why a declaration does not do for the hours of a ticket, in words; null when it does. A warning, no refusal. */
export function licenceWarning(
  answer: LicenceAnswer,
  declaration: LicenceDeclaration | null,
  { until, zone }: { until: Date; zone: string },
): string | null {
  if (answer.needed === 'no') return null;
  if (!declaration?.declared)
    return answer.needed === 'yes'
      ? 'Have a rod licence before you fish. It can be bought the same day.'
      : answer.words;
  const lastDay = civilDay(new Date(until.getTime() - 1), zone);
  if (declaration.expiresOn !== null && declaration.expiresOn < lastDay)
    return 'The rod licence runs out before the ticket does. Renew it before you fish.';
  return null;
}
