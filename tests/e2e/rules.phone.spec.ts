import { BookingList } from '@mereward/shared/bookings/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { DraftAnswer, RulesView } from '@mereward/shared/rules/sheet-contract';
import { randomUUID } from 'node:crypto';
import { expectNoAxeFaults } from './support/axe';
import { Asking, test } from './support/people';
import { expect } from './support/site';

test('a rule that somebody’s safety hangs on is read with its words before and after, and the ticket is good again', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(120_000);
  const idrisAsks = await Asking.as('idris', site);
  const sofiaAsks = await Asking.as('sofia', site);
  const { fisheries } = await idrisAsks.get('/fisheries', FisheryList);
  const fisheryId = fisheries[0]?.id ?? '';
  const { bookings } = await sofiaAsks.get('/bookings/mine', BookingList);
  const ticket = bookings.find(({ status }) => status === 'confirmed')?.id ?? '';
  const draftPath = `/fisheries/${fisheryId}/rules/draft`;

  const idris = await pageOf({ who: 'idris' });
  await idris.goto(`/office/rules?fisheryId=${fisheryId}`);
  const before = await idrisAsks.get(`/fisheries/${fisheryId}/rules`, RulesView);
  if (before.sheet === null) {
    await idris.getByRole('button', { name: 'Begin with usual rules' }).click();
    await expect(idris.getByRole('list', { name: 'Rules of the draft' })).toContainText(
      'Barbless hooks only.',
    );
    await expectNoAxeFaults(idris);
    await idris.getByRole('button', { name: 'Publish', exact: true }).click();
    await idris.getByRole('button', { name: 'Publish the rules' }).click();
    await expect(idris.getByRole('heading', { name: 'In force: version 1' })).toBeVisible();
  }
  const { sheet } = await idrisAsks.get(`/fisheries/${fisheryId}/rules`, RulesView);
  if (!sheet) throw new Error('Rules are in force by now.');
  const read = { id: randomUUID(), version: { major: sheet.major, minor: sheet.minor } };
  const at = new Date().toISOString();
  await sofiaAsks.do('POST', `/fisheries/${fisheryId}/rules/acknowledge`, { ...read, at, language: 'en-GB' });

  const plain = sheet.rules.findIndex(({ category }) => category !== 'safety');
  const rules = sheet.rules.map((rule, index) =>
    index === plain
      ? { ...rule, text: `${rule.text} FO3 is closed.`, category: 'safety', severity: 'remove' }
      : rule,
  );
  const wish = { id: randomUUID(), sheet: { rules }, version: null };
  await idrisAsks.do('PUT', draftPath, wish);
  const { draft } = await idrisAsks.get(draftPath, DraftAnswer);
  await idris.goto(`/office/rules?fisheryId=${fisheryId}`);
  await expect(idris.getByRole('heading', { name: '1 rule changed' })).toBeVisible();
  await expect(idris.getByRole('radio', { name: /Somebody’s safety hangs on it/ })).toBeChecked();
  await idris.getByRole('button', { name: 'Publish', exact: true }).click();
  await expect(idris.getByText(`${draft?.upcoming ?? 0} booking`).first()).toBeVisible();
  await idris.getByRole('button', { name: 'Publish the rules' }).click();
  await expect(idris.getByRole('heading', { name: `In force: version ${sheet.major + 1}` })).toBeVisible();

  const sofia = await pageOf({ who: 'sofia' });
  await sofia.goto(`/tickets/bookings/${ticket}`);
  await expect(sofia.getByText('Not valid until the rules are read').first()).toBeVisible();
  const changes = sofia.getByRole('list', { name: 'What changed' });
  await expect(changes).toContainText('Before');
  await expect(changes).toContainText('FO3 is closed.');
  await expectNoAxeFaults(sofia);
  await sofia.getByRole('button', { name: 'I have read the rules and will keep them' }).click();
  await expect(sofia.getByText(/read on a screen/)).toBeVisible();
  await expect(sofia.getByText('Not valid until the rules are read')).toHaveCount(0);
});
