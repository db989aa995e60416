import { letter, type Letter } from './letter';

type Reader = { email: string; name: string };

export const verifyMessage = (to: Reader, url: string): Letter =>
  letter(to.email, {
    subject: 'Confirm your address for Mereward',
    lines: [`Hello ${to.name},`, 'One step is left: confirm that this address is yours.'],
    link: { label: 'Confirm my address', url },
    after: [
      'The link works for 24 hours. If it has run out, sign in and ask for another.',
      'If you did not ask for an account, do nothing: without this step nobody can use it.',
    ],
  });

/** For an address that already has an account: says so to its holder alone, never to whoever typed it. */
export const alreadyKnownMessage = (to: Reader, signInUrl: string): Letter =>
  letter(to.email, {
    subject: 'You already have a Mereward account',
    lines: [
      `Hello ${to.name},`,
      'Somebody, perhaps you, asked for an account with this address. It has one already, and nothing about it was changed.',
    ],
    link: { label: 'Sign in', url: signInUrl },
    after: ['If you no longer know the password, ask for a new one on the sign-in page.'],
  });

export const resetMessage = (to: Reader, url: string): Letter =>
  letter(to.email, {
    subject: 'Choose a new password for Mereward',
    lines: [
      `Hello ${to.name},`,
      'Here you can choose a new password. Every device is signed out when you do.',
    ],
    link: { label: 'Choose a new password', url },
    after: [
      'The link works once, for one hour.',
      'If you did not ask for it, do nothing: your password stays as it is.',
    ],
  });

export const passwordChangedMessage = (to: Reader): Letter =>
  letter(to.email, {
    subject: 'Your Mereward password was changed',
    lines: [
      `Hello ${to.name},`,
      'Your password was changed just now, and every device was signed out.',
      'If that was not you, ask for a new password on the sign-in page at once.',
    ],
  });

type InvitationWords = { email: string; fishery: string; role: string; invitedBy: string; days: number };

export const invitationMessage = (to: InvitationWords, url: string): Letter =>
  letter(to.email, {
    subject: `${to.fishery} invites you`,
    lines: [
      'Hello,',
      `${to.invitedBy} invites you to ${to.fishery} with the role “${to.role}”.`,
      `Sign in with this address (${to.email}), or make an account with it, and take the invitation up.`,
    ],
    link: { label: 'See the invitation', url },
    after: [
      `The link works for ${to.days} days. If you don't know ${to.fishery}, do nothing: no account is made for you.`,
    ],
  });

type ChartWords = Reader & { lake: string; fishery: string };

/** To those who may approve. `submittedBy` is a name. */
export const chartWaitingMessage = (to: ChartWords & { submittedBy: string }, url: string): Letter =>
  letter(to.email, {
    subject: `${to.lake}: a chart waits for approval`,
    lines: [
      `Hello ${to.name},`,
      `${to.submittedBy} has submitted a chart of ${to.lake} (${to.fishery}). Nobody else sees it until somebody who neither surveyed nor submitted it has approved it.`,
    ],
    link: { label: 'Look at the chart', url },
    after: ['Look at the checks and the parts not surveyed before you approve.'],
  });

/** To its surveyors and whoever submitted it. `version` as printed, like “2027.1”. */
export const chartPublishedMessage = (to: ChartWords & { version: string }, url: string): Letter =>
  letter(to.email, {
    subject: `${to.lake}: chart ${to.version} is published`,
    lines: [
      `Hello ${to.name},`,
      `Chart ${to.version} of ${to.lake} (${to.fishery}) was approved and is published. Visitors see as much of it as the lake shows to them.`,
    ],
    link: { label: 'Open the chart', url },
  });
