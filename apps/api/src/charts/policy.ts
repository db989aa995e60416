import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, rolesAt, type Actor } from '../ctx';
import { CHART_APPROVERS } from '../lakes/policy';

type Wanted = { fisheryId: string; submittedBy: string | null; surveyors: ReadonlySet<string> };

/** Why this person may not approve a chart, in words; null when they may. Nobody approves their own work. */
export function whyNotApprove(actor: Actor, { fisheryId, submittedBy, surveyors }: Wanted): string | null {
  if (actor.kind === 'stranger') return 'Sign in first.';
  if (!CHART_APPROVERS.some((role) => rolesAt(actor, fisheryId).has(role)))
    return 'The owner or a manager approves charts.';
  if (surveyors.has(actor.id)) return 'You surveyed this chart: someone else approves it.';
  if (submittedBy === actor.id) return 'You submitted this chart: someone else approves it.';
  return null;
}

/** Who reads what anglers found otherwise, and decides what becomes of it. */
export const DISAGREEMENT_DECIDERS = [
  'owner',
  'manager',
  'head_bailiff',
  'office',
] as const satisfies readonly Role[];

/** Why this person may not decide a report, in words; null when they may. Nobody decides their own. */
export function whyNotDecide(
  actor: Actor,
  { fisheryId, reportedBy }: { fisheryId: string; reportedBy: string },
): string | null {
  if (actor.kind === 'stranger') return 'Sign in first.';
  if (!holdsAny(actor, fisheryId, DISAGREEMENT_DECIDERS))
    return 'The office or the head bailiff decides this.';
  return reportedBy === actor.id ? 'You reported this yourself: someone else decides it.' : null;
}
