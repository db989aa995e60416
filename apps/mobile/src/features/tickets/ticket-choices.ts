import type { Audience, Duration, TicketPrice, TicketType } from '@mereward/shared/tickets/contract';
import type { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import type { Choice } from '@/components/choice-props';

export const AUDIENCES: readonly Choice<Audience>[] = [
  { key: 'public', label: 'Everybody' },
  { key: 'member', label: 'Members' },
  { key: 'guest', label: 'Guests', note: 'beside their host’s ticket' },
  { key: 'junior', label: 'Juniors' },
  { key: 'concession', label: 'Concession', note: 'proof is shown' },
  { key: 'match', label: 'Match', note: 'those entered' },
  { key: 'staff', label: 'Staff' },
];

export const DURATION_KINDS: readonly Choice<Duration['kind']>[] = [
  { key: 'dawn_dusk', label: 'Dawn to dusk', note: 'by each day’s sun' },
  { key: 'fixed_hours', label: 'Fixed hours', note: 'such as 07:00 to 19:00' },
  { key: 'elapsed', label: '12 to 72 hours', note: 'from a start they pick' },
  { key: 'night', label: 'Night', note: 'such as 19:00 to 07:00' },
  { key: 'season', label: 'Season', note: 'from day to day' },
  { key: 'match', label: 'Match', note: 'one set of hours' },
];

export const STAY_HOURS: readonly Choice<'12' | '24' | '48' | '72'>[] = [
  { key: '12', label: '12 hours' },
  { key: '24', label: '24 hours' },
  { key: '48', label: '48 hours' },
  { key: '72', label: '72 hours' },
];

export const START_STEPS: readonly Choice<'15' | '30' | '60'>[] = [
  { key: '60', label: 'Hour' },
  { key: '30', label: 'Half hour' },
  { key: '15', label: 'Quarter' },
];

export const CLOCK_CHANGES: readonly Choice<'same_clock_time' | 'elapsed_hours'>[] = [
  { key: 'same_clock_time', label: 'Same clock time', note: 'noon to noon, an hour more or less' },
  { key: 'elapsed_hours', label: 'Full hours', note: 'always 24, so noon to 11:00 or 13:00' },
];

export const PEG_CHOICES: readonly Choice<TicketType['pegChoice']>[] = [
  { key: 'book_a_peg', label: 'A peg is booked' },
  {
    key: 'book_the_lake_choose_on_arrival',
    label: 'Chosen on arrival',
    note: 'the lake’s numbers still hold',
  },
  { key: 'draw', label: 'Drawn' },
];

export const VAT_CODES: readonly Choice<TicketPrice['vatCode']>[] = [
  { key: 'standard', label: 'Standard rate' },
  { key: 'reduced', label: 'Reduced rate' },
  { key: 'zero', label: 'Zero rate' },
  { key: 'exempt', label: 'Exempt' },
  { key: 'outside_scope', label: 'No VAT charged', note: 'not registered' },
];

export type TemplateName = keyof typeof TICKET_TEMPLATES;

export const TEMPLATES: readonly Choice<TemplateName>[] = [
  { key: 'day', label: 'Day' },
  { key: 'stay24', label: '24 hours' },
  { key: 'stay48', label: '48 hours' },
  { key: 'night', label: 'Night' },
  { key: 'junior', label: 'Junior day' },
  { key: 'concession', label: 'Concession day' },
  { key: 'guest', label: 'Guest day' },
  { key: 'match', label: 'Match peg' },
];
