import type { WaitingView } from '@mereward/shared/bookings/waiting-contract';
import { dayAndTime } from '@/lib/format-time';

type Standing = Pick<WaitingView, 'status' | 'place' | 'claimUntil' | 'zone'>;

/** Where somebody stands in a line: "You are third in line." */
export function placeWords({ status, place, claimUntil, zone }: Standing): string {
  switch (status) {
    case 'waiting':
      return place === null ? 'You are in line.' : `You are ${ordinal(place)} in line.`;
    case 'offered':
      return claimUntil === null
        ? 'A peg is kept for you.'
        : `A peg is kept for you until ${dayAndTime(claimUntil, zone)}. Finish the booking by then.`;
    case 'claimed':
      return 'You took the peg you were offered.';
    case 'passed':
      return 'The day came without a peg.';
    case 'left':
      return 'You left the line.';
  }
}

/** "first", "second", "21st". */
export function ordinal(place: number): string {
  const words = ['first', 'second', 'third', 'fourth', 'fifth'];
  const word = words[place - 1];
  if (word !== undefined) return word;
  const teen = place % 100 >= 11 && place % 100 <= 13;
  const ending = teen ? 'th' : (['th', 'st', 'nd', 'rd'][place % 10] ?? 'th');
  return `${String(place)}${ending}`;
}
