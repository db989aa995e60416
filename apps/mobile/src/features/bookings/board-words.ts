import type { BoardSpan, BoardView } from '@mereward/shared/bookings/availability-contract';
import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import type { ShapeName } from '@/components/shape';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { dayAndTime } from '@/lib/format-time';

/** How a span stands, by shape and word. */
export const SPAN_LOOKS = {
  held: { shape: 'diamond', tone: 'amber', word: 'held' },
  taken: { shape: 'square', tone: 'water', word: 'taken' },
  blocked: { shape: 'bar', tone: 'inkSoft', word: 'kept back' },
  closed: { shape: 'cross', tone: 'brick', word: 'closed' },
} as const satisfies Record<BoardSpan['state'], { shape: ShapeName; tone: string; word: string }>;

/** What a span says in as little room as there is: who has it where the reader may know, else how it stands. */
export const spanName = ({ state, words, booking }: BoardSpan): string =>
  booking?.holder || words || SPAN_LOOKS[state].word;

/** When a span runs, in the zone: its fishing time where turnaround follows. */
export function spanTimes({ from, until, fishingUntil }: BoardSpan, zone: string): string {
  const end = fishingUntil ?? until;
  return end ? ticketTimes({ from, until: end, zone }) : `from ${dayAndTime(from, zone)} until lifted`;
}

/** A span in full: "taken, Ada Reed, 7KD MXP, Sat 4 July 2026, 07:00 to 20:00". */
export function spanWords(span: BoardSpan, zone: string): string {
  const { booking, state, words } = span;
  return [
    SPAN_LOOKS[state].word,
    ...(booking ? [booking.holder, bookingCodeWords(booking.code)] : words ? [words] : []),
    spanTimes(span, zone),
  ].join(', ');
}

/** One line of the board: a peg, or the tickets that take a peg on arrival. */
export type BoardLine = {
  key: string;
  pegId: string | null;
  title: string;
  shut: string | null;
  spans: readonly BoardSpan[];
};

/** The board's lines in walking order, those that choose on arrival last. */
export function boardLines({ pegs, choosing }: BoardView): BoardLine[] {
  return [
    ...pegs.map(({ pegId, number, shut, spans }) => ({ key: pegId, pegId, title: number, shut, spans })),
    ...(choosing.length > 0
      ? [{ key: 'choosing', pegId: null, title: 'On arrival', shut: null, spans: choosing }]
      : []),
  ];
}
