import { rolesAt, type Actor } from '../ctx';
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
