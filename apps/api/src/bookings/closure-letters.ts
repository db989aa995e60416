import type { Closure } from '@mereward/db/entities/closures/closure';
import type { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { CLOSURE_REASON_WORDS } from '@mereward/shared/closures/closure-effect';
import { moneyWords } from '@mereward/shared/money/money';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { Ctx } from '../ctx';
import { letter, type Letter } from '../mail/letter';
import { post } from '../mail/send';
import { currencyOf } from '../payments/currency';

/** Posts a letter where there is an address; a holder without one is told at the lodge. */
export async function postIf(
  ctx: Ctx,
  email: string | null,
  letterTo: (email: string) => Letter,
): Promise<void> {
  if (email !== null && email !== '') await post(ctx, letterTo(email));
}

type To = { email: string; holder: string; code: string; lakeName: string; from: Date; currency: string };
type Closed = { closure: Closure; fishery: Fishery };

const when = (at: Date, { zone }: Fishery): string => dayAndClock(at.toISOString(), zone);

function head({ holder, code, lakeName, from }: To, { closure, fishery }: Closed): string[] {
  const reason = CLOSURE_REASON_WORDS[closure.reason].toLowerCase();
  const { until } = closure.details;
  const end = until === null ? 'until it is lifted' : `until ${when(new Date(until), fishery)}`;
  return [
    `Hello ${holder},`,
    `${fishery.name} has to close (${reason}) from ${when(new Date(closure.details.from), fishery)} ${end}: ${closure.details.publicWords}`,
    `It lies over your booking ${code}${lakeName === '' ? '' : ` on ${lakeName}`}, ${when(from, fishery)}.`,
  ];
}

export const closedChooseLetter = (to: To, closed: Closed & { chooseUntil: Date }, url: string): Letter =>
  letter(to.email, {
    subject: `${closed.fishery.name} is closed: choose what becomes of booking ${to.code}`,
    lines: [
      ...head(to, closed),
      `Choose by ${when(closed.chooseUntil, closed.fishery)}: another date, another lake where one is offered, or all your money back.`,
    ],
    link: { label: 'Choose', url },
    after: [
      'If we hear nothing by then, all of your money is given back.',
      'Whoever has this link can choose, so keep it to yourself.',
    ],
  });

export const closedRefundLetter = (to: To, closed: Closed, backPence: number): Letter =>
  letter(to.email, {
    subject: `${closed.fishery.name} is closed: booking ${to.code} is cancelled`,
    lines: [
      ...head(to, closed),
      backPence > 0
        ? `The booking is cancelled, and ${moneyWords(backPence, currencyOf(to.currency))} is on its way back to you.`
        : 'The booking is cancelled. Nothing had been paid for it.',
    ],
  });

export const closedTellLetter = (to: To, closed: Closed): Letter =>
  letter(to.email, {
    subject: `${closed.fishery.name}: ${CLOSURE_REASON_WORDS[closed.closure.reason].toLowerCase()}`,
    lines: [...head(to, closed), 'Your ticket stays good outside of what is closed.'],
  });

export const choiceKeptLetter = (to: To, { fishery }: Pick<Closed, 'fishery'>, words: string): Letter =>
  letter(to.email, {
    subject: `${fishery.name}: what becomes of booking ${to.code}`,
    lines: [`Hello ${to.holder},`, words],
  });
