import type { Units } from '@mereward/shared/accounts/contract';
import { DepthBy, type Disagree, type FoundAt } from '@mereward/shared/charts/disagreement';
import { toMetres } from '@mereward/shared/units/length';
import { readWraps } from '@mereward/shared/units/wraps';
import { z } from 'zod';
import { readPosition } from '@/lib/position-text';
import { typedNumberOrNothing } from '@/lib/typed-schemas';

export const BY_COUNT = 'count';
export const BY_PLACE = 'place';

export const BOTTOMS = ['gravel', 'clay', 'sand', 'silt_firm', 'silt_deep', 'leaf', 'shell'] as const;

type Told = Omit<Disagree, 'id'>;

/** What is typed, made into what is sent; depths in the reader's own unit. */
export const disagreeDraft = ({ length, stickSpacingM }: Units) =>
  z
    .object({
      where: z.string(), // a spot's id, BY_COUNT or BY_PLACE
      position: z.string(),
      markId: z.string(),
      offsetDeg: z.number().min(-90).max(90).nullable(),
      count: z.string(),
      readTo: z.enum(['lead_to_rod_tip', 'lead_to_clip']),
      day: z.string().min(1, 'Say which day it was.'),
      found: z.object({
        depthM: typedNumberOrNothing({
          min: 0.1,
          max: length === 'm' ? 60 : 196,
          unit: length,
          what: 'The depth',
        }),
        depthBy: DepthBy,
        bottom: z.enum(['', ...BOTTOMS]),
        snag: z.boolean(),
        weed: z.enum(['unsaid', 'clear', 'low', 'thick']),
        note: z.string().trim().max(500, 'At most 500 letters.'),
      }),
    })
    .transform((typed, context): Told => {
      const refuse = (path: string[], message: string): typeof z.NEVER => {
        context.issues.push({ code: 'custom', message, path, input: typed });
        return z.NEVER;
      };
      const { found } = typed;
      const at = ((): FoundAt => {
        if (typed.where === BY_COUNT) {
          const read = readWraps(typed.count, stickSpacingM);
          if (typed.markId === '') return refuse(['markId'], 'Choose the mark you cast over.');
          if (!read.ok) return refuse(['count'], read.reason);
          return {
            by: 'count',
            markId: typed.markId,
            offsetDeg: typed.offsetDeg ?? 0,
            wrapsWhole: read.wraps.whole,
            remainderM: read.wraps.remainderM,
            stickSpacingM,
            wrapReference: typed.readTo,
          };
        }
        if (typed.where !== BY_PLACE) return { by: 'spot', spotId: typed.where };
        const position = readPosition(typed.position);
        return position ? { by: 'place', position } : refuse(['position'], 'Touch the place on the water.');
      })();
      const said = found.depthM !== null || found.bottom !== '' || found.snag || found.weed !== 'unsaid';
      if (!said)
        return refuse(['found', 'depthM'], 'Say what you found: a depth, the bottom, a snag or weed.');
      return {
        day: typed.day,
        at,
        found: {
          depthM: found.depthM === null ? null : toMetres(found.depthM, length),
          depthBy: found.depthM === null ? null : found.depthBy,
          bottom: found.bottom === '' ? null : found.bottom,
          snag: found.snag,
          weed: found.weed === 'unsaid' ? null : found.weed,
          note: found.note,
        },
      };
    });
export type DisagreeTyped = z.input<ReturnType<typeof disagreeDraft>>;
