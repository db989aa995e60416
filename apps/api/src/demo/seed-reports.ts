import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import type { Found } from '@mereward/shared/charts/disagreement';
import type { EntityManager } from 'typeorm';
import { decideDisagreement } from '../charts/decide-disagreement';
import { disagree } from '../charts/disagree';
import { demoCtx } from './demo-ctx';
import { FAR_OSTLE_LAKE } from './fishery';
import { COLIN, JOAN } from './people';
import { demoId } from './random';
import { DEMO_KIT } from './simulate-casts';

const DAY_MS = 86_400_000;

type Telling = { at: Date; peg: string; mark: string; wrapsWhole: number; found: Found };

/** What Colin found otherwise off FO3 before the spring survey; Joan accepted it, so the spring chart is made with it. */
export async function seedAccepted(tx: EntityManager, at: Date): Promise<void> {
  if (await tx.existsBy(Disagreement, { id: demoId('report FO3') })) return;
  const found = { depthM: 2.4, depthBy: 'float', bottom: 'gravel', snag: false, weed: 'clear' } as const;
  const note = 'Rattled all the way in; the chart has silt there.';
  const id = await tell(tx, {
    at,
    peg: 'FO3',
    mark: 'tall poplar',
    wrapsWhole: 14,
    found: { ...found, note },
  });
  await decideDisagreement(demoCtx(tx, JOAN, new Date(at.getTime() + DAY_MS)), id, {
    decision: 'accept',
    remeasured: null,
    reason: '',
  });
}

/** Another, a few days ago off FO12, that waits for a person. */
export async function seedWaiting(tx: EntityManager, now: Date): Promise<void> {
  if (await tx.existsBy(Disagreement, { id: demoId('report FO12') })) return;
  const found = { depthM: 1.9, depthBy: 'float', bottom: 'sand', snag: false, weed: 'low' } as const;
  await tell(tx, {
    at: new Date(now.getTime() - 4 * DAY_MS),
    peg: 'FO12',
    mark: 'white gate',
    wrapsWhole: 9,
    found: { ...found, note: 'Shallower than it was in spring.' },
  });
}

async function tell(tx: EntityManager, { at, peg, mark, wrapsWhole, found }: Telling): Promise<string> {
  const pegId = FAR_OSTLE_LAKE.pegs.find(({ details }) => details.number === peg)?.id;
  const markId = FAR_OSTLE_LAKE.marks.find(({ details }) => details.name === mark)?.id;
  if (!pegId || !markId) throw new RangeError('A report names a peg and a mark of Far Ostle');
  const id = demoId(`report ${peg}`);
  await disagree(demoCtx(tx, COLIN, at), pegId, {
    id,
    day: at.toISOString().slice(0, 10),
    at: {
      by: 'count',
      markId,
      offsetDeg: 0,
      wrapsWhole,
      remainderM: 0,
      stickSpacingM: DEMO_KIT.stickSpacingM,
      wrapReference: DEMO_KIT.wrapReference,
    },
    found,
  });
  return id;
}
