import type { Units } from '@mereward/shared/accounts/contract';
import { POOREST_FIX_M, sigmaOfRadiusM, walkReport, type ShoreWalk } from '@mereward/shared/lakes/shore-walk';
import { WALK_TOLERANCE_M, type WalkedRing } from '@mereward/shared/lakes/walked-ring';
import { figure, length } from '@/lib/format';
import type { PositionTrouble } from '@/lib/watched-position';

const counted = (count: number, one: string, many: string): string =>
  `${figure(count)} ${count === 1 ? one : many}`;

/** "3 fixes left out: 2 poorer than 15 m, 1 too far off to have been walked to." Null when none was. */
export function leftOutWords({ left }: Pick<ShoreWalk, 'left'>, units: Units): string | null {
  const { poor, jumped, unreadable } = left;
  const all = poor + jumped + unreadable;
  if (all === 0) return null;
  const why = [
    poor > 0 ? `${figure(poor)} poorer than ${length(POOREST_FIX_M, units, 0)}` : '',
    jumped > 0 ? `${figure(jumped)} too far off to have been walked to` : '',
    unreadable > 0 ? `${figure(unreadable)} that could not be read` : '',
  ].filter(Boolean);
  return `${counted(all, 'fix', 'fixes')} left out: ${why.join(', ')}.`;
}

/** What nobody was seen to walk; null when there is no such stretch. */
export function gapWords(walk: Pick<ShoreWalk, 'stations'>, units: Units): string | null {
  const { count, lengthM } = walkReport(walk).gaps;
  if (count === 0) return null;
  return `${counted(count, 'stretch', 'stretches')} not walked, ${length(lengthM, units, 0)} in all: the line runs straight there, the shore may not.`;
}

/** How sure the places are; null before the first. */
export function surenessWords(walk: Pick<ShoreWalk, 'stations'>, units: Units): string | null {
  const { radiusM, worstM } = walkReport(walk);
  if (radiusM === null || worstM === null) return null;
  const sigma = length(sigmaOfRadiusM(radiusM), units);
  return `By the phone’s own telling a place lies within ${length(radiusM, units)} in 19 of 20 cases (σ ${sigma} each way), the least sure within ${length(worstM, units)}. Under trees it is worse than phones tell.`;
}

/** What was made of the walk when its ring was closed. */
export function ringWords({ places, loops, overlapM, closingM }: WalkedRing, units: Units): string {
  const parts = [
    `${counted(places.length, 'point', 'points')}, none of the walk more than ${length(WALK_TOLERANCE_M, units, 0)} from the line between them.`,
    closingM > 5
      ? `The last ${length(closingM, units, 0)} back to the start were not walked: the line runs straight there.`
      : '',
    overlapM > 1 ? `${length(overlapM, units, 0)} walked twice at the start were left off.` : '',
    loops > 0 ? `${counted(loops, 'small loop was', 'small loops were')} cut off.` : '',
  ];
  return parts.filter(Boolean).join(' ');
}

/** Why there is no position, and what to do about it. */
export function troubleWords(trouble: PositionTrouble): { title: string; words: string } {
  switch (trouble) {
    case 'denied':
      return {
        title: 'This page may not know where the phone is',
        words:
          'Allow location for it in the browser’s settings for this site, and in the phone’s own settings for the browser, then press “Go on”. What was walked so far is kept.',
      };
    case 'no-signal':
      return {
        title: 'No position just now',
        words:
          'The phone is still listening. Stand in the open, away from trees and buildings, and wait. What was walked so far is kept.',
      };
    case 'not-here':
      return {
        title: 'No position can be had here',
        words:
          'This browser can’t tell where it is, or the page was not opened over https. Open it in the phone’s own browser at the https address, or draw the shore by tapping.',
      };
  }
}

/** Stands where the walk begins, never behind a tooltip. */
export const WALK_CAUTION =
  'Watch your step and the water’s edge, not the screen: stop before you look. Keep back from steep, soft or undercut banks and go round what you can’t pass. Not alone at dusk or in the dark, and tell somebody where you are. The fishery’s own rules come before this.';
