import { OSTLEMERE_ID, OSTLEMERE } from './fishery';
import type { Ctx } from '../ctx';
import { putLettingTerms } from '../bookings/terms';
import { acknowledgeRules } from '../rules/acknowledge';
import { putDraft } from '../rules/draft';
import { publishDraft } from '../rules/publish';
import { writeNotice } from '../notices/write-notice';
import { makeTicketType } from '../tickets/ticket-types';
import type { EntityManager } from 'typeorm';
import { DAY_MS } from '@mereward/shared/time/zoned';
import { civilDay } from '@mereward/shared/time/civil-day';
import { demoCtx } from './demo-ctx';
import { DEMO_RULES, DEMO_TERMS, demoTicketTypes } from './letting';
import { COLIN, IDRIS, JOAN, MARIAN, SOFIA } from './people';
import { demoId } from './random';
import { seedStays } from './seed-stays';

/** A year of letting pegs: kinds of ticket, terms, two versions of the rules, notices, tickets and their money. */
export async function seedLetting(tx: EntityManager, now: Date): Promise<void> {
  const before = (days: number): Date => new Date(now.getTime() - days * DAY_MS);
  const types = demoTicketTypes(Number(civilDay(now, OSTLEMERE.zone).slice(0, 4)));
  const owner = demoCtx(tx, MARIAN, before(390));
  await putLettingTerms(owner, OSTLEMERE_ID, { details: DEMO_TERMS, version: null });
  for (const type of types) await makeTicketType(owner, OSTLEMERE_ID, type);
  await seedRules(demoCtx(tx, IDRIS, before(380)), { version: 'first', weight: 'change' });
  await read(demoCtx(tx, COLIN, before(300)), { major: 1, minor: 0 });
  await seedRules(demoCtx(tx, IDRIS, before(45)), { version: 'second', weight: 'safety' });
  await read(demoCtx(tx, SOFIA, before(1)), { major: 2, minor: 0 });
  await seedNotices(demoCtx(tx, JOAN, before(2)));
  await seedStays(tx, { types, now });
}

type Sheet = { version: keyof typeof DEMO_RULES; weight: 'change' | 'safety' };

async function seedRules(ctx: Ctx, { version, weight }: Sheet): Promise<void> {
  const id = demoId(`rule sheet ${version}`);
  await putDraft(ctx, OSTLEMERE_ID, { id, sheet: { rules: DEMO_RULES[version] }, version: null });
  await publishDraft(ctx, OSTLEMERE_ID, { draftId: id, version: 1, weight });
}

const read = (ctx: Ctx, version: { major: number; minor: number }): Promise<void> =>
  acknowledgeRules(ctx, OSTLEMERE_ID, {
    id: demoId(`read ${version.major} ${ctx.now.toISOString().slice(0, 10)}`),
    version,
    at: ctx.now.toISOString(),
    language: 'en-GB',
    device: 'a phone of the demo',
  });

async function seedNotices(ctx: Ctx): Promise<void> {
  const from = ctx.now.toISOString();
  const soon = new Date(ctx.now.getTime() + 12 * DAY_MS).toISOString();
  await writeNotice(ctx, OSTLEMERE_ID, {
    id: demoId('notice gate'),
    lakeIds: [],
    severity: 'info',
    from,
    until: soon,
    details: {
      title: 'The far gate sticks',
      text: 'Lift it as you push. It will be mended this month.',
      audience: 'public',
    },
  });
  await writeNotice(ctx, OSTLEMERE_ID, {
    id: demoId('notice otters'),
    lakeIds: [demoId('lake FO')],
    severity: 'caution',
    from,
    until: null,
    details: {
      title: 'Soft bank by the inflow',
      text: 'The margin beside FO20 gives way. Keep back from the edge and keep children away from it.',
      audience: 'public',
    },
  });
}
