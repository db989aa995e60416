import { LeadCalibration } from '@mereward/db/entities/surveys/lead-calibration';
import { Problem } from '@mereward/shared/problems/problem';
import type { Kit } from '@mereward/shared/surveys/contract';
import type { LeadCalibration as Calibration } from '@mereward/shared/surveys/lead-fall';
import type { EntityManager } from 'typeorm';

/** The rate of fall of the lead a kit names, when it is this very lead on this very line; else none. */
export async function leadOfKit(tx: EntityManager, fisheryId: string, kit: Kit): Promise<Calibration | null> {
  if (!kit.leadId) return null;
  const lead = await tx.findOneBy(LeadCalibration, { id: kit.leadId, fisheryId });
  return lead && fits(lead, kit) ? lead.calibration : null;
}

/** Refuses a kit that names a lead it doesn't throw: its counts would be turned into wrong depths. */
export async function refuseWrongLead(tx: EntityManager, fisheryId: string, kit: Kit): Promise<void> {
  if (!kit.leadId) return;
  const lead = await tx.findOneBy(LeadCalibration, { id: kit.leadId, fisheryId });
  if (lead && fits(lead, kit)) return;
  const detail = lead
    ? `“${lead.name}” was calibrated at ${lead.leadG} g on ${lead.lineType}; the kit throws ${kit.leadG} g on ${kit.lineType}, or another shape.`
    : 'There is no such calibrated lead at this fishery.';
  throw new Problem('invalid', 'This lead doesn’t go with the kit', {
    detail: 'Choose the lead that is thrown, or none: then counts stay counts.',
    errors: [{ pointer: '/kit/leadId', detail }],
  });
}

const fits = ({ leadG, leadShape, lineType }: LeadCalibration, kit: Kit): boolean =>
  leadG === kit.leadG && leadShape === kit.leadShape && lineType === kit.lineType;
