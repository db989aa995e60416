import { z } from 'zod';
import { Kit } from './contract';

/** One count of a lead's fall over a spot of known depth. */
export const KnownFall = z.strictObject({
  seconds: z.number().gt(0, 'A count greater than nothing').max(60),
  depthM: z.number().gt(0, 'A depth greater than nothing').max(60), // below the water of that hour, by float or tape
});
export type KnownFall = z.infer<typeof KnownFall>;

export const LeadCalibration = z.object({
  rateMPerS: z.number(),
  rateSigmaMPerS: z.number(), // standard error of the rate
  scatterM: z.number(), // of one depth about the rate
  spots: z.int(),
  longestS: z.number().optional(), // the longest fall it was learnt on; beyond half as long again it is a guess
});

/** POST /api/fisheries/:fisheryId/leads: a lead with its falls; kept for good, so that a chart's depths stay explained. */
export const CalibrateLead = z.strictObject({
  id: z.uuid(),
  name: z.string().trim().min(1).max(80),
  leadG: Kit.shape.leadG,
  leadShape: Kit.shape.leadShape,
  lineType: Kit.shape.lineType,
  falls: z.array(KnownFall).max(100),
  calibratedOn: z.iso.date(),
  note: z.string().trim().max(300),
});
export type CalibrateLead = z.infer<typeof CalibrateLead>;

export const LeadView = z.object({
  id: z.uuid(),
  name: z.string(),
  leadG: z.number(),
  leadShape: Kit.shape.leadShape,
  lineType: Kit.shape.lineType,
  falls: z.array(KnownFall),
  calibration: LeadCalibration,
  calibratedOn: z.iso.date(),
  note: z.string(),
  by: z.string(),
  putAway: z.boolean(), // no longer offered; visits that name it keep it
  usedBy: z.array(z.object({ visitId: z.uuid(), title: z.string(), lakeName: z.string() })),
});
export type LeadView = z.infer<typeof LeadView>;

/** GET /api/fisheries/:fisheryId/leads: in use first. POST /api/leads/:leadId/put-away takes one out of the choice. */
export const LeadList = z.object({ leads: z.array(LeadView), may: z.object({ calibrate: z.boolean() }) });
export type LeadList = z.infer<typeof LeadList>;
