import { randomUUID } from 'node:crypto';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { Asking, test } from './support/people';
import { expect, type Site } from './support/site';

/** Far Ostle and a day ticket on sale there, under a name of its own. */
async function aDayOnSale(site: Site, name: string) {
  const marian = await Asking.as('marian', site);
  const { fisheries } = await marian.get('/fisheries', FisheryList);
  const [fishery] = fisheries;
  const lakeId = fishery?.lakes.find((each) => each.name === 'Far Ostle')?.id ?? '';
  const { pegs } = await marian.get(`/lakes/${lakeId}`, LakeView);
  const ticketTypeId = randomUUID();
  const fisheryId = fishery?.id ?? '';
  await marian.do('POST', `/fisheries/${fisheryId}/ticket-types`, {
    id: ticketTypeId,
    details: { ...TICKET_TEMPLATES.day, name, lakeIds: [lakeId] },
  });
  const pegId = (number: string): string => pegs.find((peg) => peg.number === number)?.id ?? '';
  return { marian, fisheryId, lakeId, ticketTypeId, pegId };
}

const inDays = (days: number): string => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);

test('an owner sets a 24 hour ticket and sees what it costs over a clock change', async ({ pageOf }) => {
  const page = await pageOf({ who: 'marian' });
  await page.goto('/office/tickets/new?template=stay24');
  await page.getByLabel('Name', { exact: true }).fill('Long stay');
  const tried = page.getByRole('region', { name: 'Try it on a day' });
  await expect(tried.getByText(/would cost £28\.00 and end/)).toBeVisible();
  await page.getByLabel('Price, £').fill('30');
  await tried.getByRole('button', { name: 'Over the next clock change' }).click();
  await expect(tried.getByText(/would cost £30\.00 and end .*The clock goes (forward|back)/)).toBeVisible();
  await page.getByRole('button', { name: 'Put it on sale' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Tickets and prices' })).toBeVisible();
  await expect(page.getByRole('link', { name: 'Long stay' })).toBeVisible();
});

test('the office books for somebody, takes cash and has the receipt', async ({ pageOf, site }) => {
  const { lakeId, pegId } = await aDayOnSale(site, 'Lodge day');
  const page = await pageOf({ who: 'marian' });
  await page.goto(`/office/bookings/new?lakeId=${lakeId}&pegId=${pegId('FO3')}&day=${inDays(9)}`);
  await page.getByLabel('Name', { exact: true }).fill('Ada Reed');
  await page.getByLabel('Ticket', { exact: true }).selectOption({ label: 'Lodge day' });
  await expect(page.getByText('To pay £12.00')).toBeVisible();
  await page.getByRole('button', { name: 'Book it' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Ada Reed' })).toBeVisible();
  await page.getByRole('button', { name: 'It is paid' }).click();
  await expect(page.getByText('£12.00 paid')).toBeVisible();
  await page.getByRole('button', { name: /^Receipt \d{4}-\d{6}$/ }).click();
  await expect(page.getByText('£2.00 in £12.00, net £10.00')).toBeVisible();
});

test('the board shows another’s booking within seconds', async ({ pageOf, site }) => {
  const { marian, fisheryId, lakeId, ticketTypeId, pegId } = await aDayOnSale(site, 'Board day');
  const page = await pageOf({ who: 'marian' });
  const day = inDays(2);
  await page.goto(`/office/board?lakeId=${lakeId}&from=${day}`);
  const cell = page.getByRole('gridcell', { name: /^Peg FO5, / }).first();
  await expect(cell).toHaveAccessibleName(/: free$/);
  await marian.do('POST', `/fisheries/${fisheryId}/bookings`, {
    id: randomUUID(),
    lakeId,
    day,
    start: null,
    tickets: [
      {
        ticketTypeId,
        pegId: pegId('FO5'),
        rods: 2,
        people: 1,
        kind: 'holder',
        name: 'Ben Holt',
        bornOn: null,
      },
    ],
    holder: { name: 'Ben Holt', email: null },
    vehicle: '',
    note: '',
  });
  await expect(cell).toHaveAccessibleName(/taken, Ben Holt/, { timeout: 8_000 });
  await cell.focus();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'Peg FO5' })).toBeVisible();
  await expect(page.getByRole('button', { name: 'Take money' })).toBeVisible();
});
