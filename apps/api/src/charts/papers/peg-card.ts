import { civilDay } from '@mereward/shared/time/civil-day';
import type { Ctx } from '../../ctx';
import { drawCard } from './card-sheet';
import { pegPage } from '../peg-page';

/** A peg's card as a PDF: what the reader's own page of that peg holds, and no more. */
export async function pegCard(ctx: Ctx, pegId: string): Promise<{ filename: string; pdf: Buffer }> {
  const page = await pegPage(ctx, pegId);
  const printedOn = civilDay(ctx.now, page.fishery.zone);
  const pdf = await drawCard({ page, printedOn, printedAt: ctx.now, url: page.shortUrl });
  return { filename: `peg-${page.number.toLowerCase().replace(/[^a-z0-9]+/g, '-')}.pdf`, pdf };
}
