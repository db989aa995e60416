import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, type Actor } from '../ctx';

/** Who may do what at a lake, as roles held at its fishery. */
export const LAKE_CHANGERS = ['owner', 'manager'] as const satisfies readonly Role[];
export const PEG_CHANGERS = ['owner', 'manager', 'head_bailiff'] as const satisfies readonly Role[];
export const LEVEL_RECORDERS = [
  'owner',
  'manager',
  'head_bailiff',
  'bailiff',
] as const satisfies readonly Role[];
export const SURVEYORS = ['manager', 'head_bailiff', 'bailiff'] as const satisfies readonly Role[];
export const CHART_BUILDERS = ['manager', 'head_bailiff'] as const satisfies readonly Role[];
export const CHART_APPROVERS = ['owner', 'manager'] as const satisfies readonly Role[];
export const STAFF = [
  'owner',
  'manager',
  'head_bailiff',
  'bailiff',
  'office',
] as const satisfies readonly Role[];

const may = (roles: readonly Role[]) => (actor: Actor, fisheryId: string) =>
  holdsAny(actor, fisheryId, roles);

export const mayChangeLake = may(LAKE_CHANGERS);
export const mayChangePegs = may(PEG_CHANGERS);
export const mayRecordLevel = may(LEVEL_RECORDERS);
export const maySurvey = may(SURVEYORS);
export const mayBuildCharts = may(CHART_BUILDERS);
export const mayApproveCharts = may(CHART_APPROVERS);
export const isStaff = may(STAFF);
export const isMember = may([...STAFF, 'member']);
