import { ChartList, ChartReview, ChartView, PegPageView } from '@mereward/shared/charts/contract';
import { DisagreementReviewList } from '@mereward/shared/charts/disagreement';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { VisitList } from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { expectNoAxeFaults } from './support/axe';
import { Asking, test } from './support/people';
import { expect } from './support/site';

test('Sofia, with a ticket, says that it isn’t like that; Idris accepts it, and the next chart has it', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(150_000);
  const idrisAsks = await Asking.as('idris', site);
  const { fisheries } = await idrisAsks.get('/fisheries', FisheryList);
  const lakeId = fisheries[0]?.lakes.find(({ name }) => name === 'Far Ostle')?.id ?? '';
  const { pegs } = await idrisAsks.get(`/lakes/${lakeId}`, LakeView);
  const pegId = pegs.find(({ number }) => number === 'FO7')?.id ?? '';
  const { spots, chart } = await idrisAsks.get(`/pegs/${pegId}/page`, PegPageView);
  const published = await idrisAsks.get(`/charts/${chart?.id ?? ''}`, ChartView);

  const sofia = await pageOf({ who: 'sofia' });
  await sofia.goto(`/water/pegs/${pegId}`);
  await sofia.getByRole('link', { name: 'It isn’t like that' }).first().click();
  await expect(sofia.getByRole('heading', { level: 1 })).toHaveText('It isn’t like that');
  await expect(sofia.getByLabel('Where it was')).toHaveValue(spots?.[0]?.id ?? 'a spot');
  await sofia.getByRole('button', { name: 'Send it to the fishery' }).click();
  await expect(sofia.getByText(/Say what you found: a depth/)).toBeVisible();
  await sofia.getByLabel('Depth, m').fill('1.1');
  await expect(sofia.getByRole('radio', { name: 'Marker float' })).toBeChecked();
  await expectNoAxeFaults(sofia);
  await sofia.getByRole('button', { name: 'Send it to the fishery' }).click();
  await expect(sofia.getByText('The chart stays as it is until then').first()).toBeVisible();
  await expect(sofia.getByRole('list', { name: 'What you told of this peg' })).toContainText('waits');

  const idris = await pageOf({ who: 'idris' });
  await idris.goto('/office');
  await idris.getByRole('link', { name: /2 reports that Far Ostle is not as charted/ }).click();
  await expect(idris.getByRole('heading', { name: 'Peg FO7: 1.1 m by marker float' })).toBeVisible();
  const report = idris.getByRole('group', { name: 'Peg FO7: 1.1 m by marker float' });
  await expect(report.getByText(/shallower than charted/)).toBeVisible();
  await expect(report.getByText(/FO7, cast \d+/).first()).toBeVisible();
  await expectNoAxeFaults(idris);
  await report.getByRole('button', { name: 'Accept…' }).click();
  await idris.getByRole('button', { name: 'Accept as grade C' }).click();
  await expect(idris.getByText(/^Accepted as grade C by Idris Penhale/)).toBeVisible();

  expect(await idrisAsks.get(`/charts/${published.id}`, ChartView)).toEqual(published);
  const { visits } = await idrisAsks.get(`/lakes/${lakeId}/visits`, VisitList);
  const ofChart = visits.filter(({ startedAt }) => startedAt.slice(0, 10) >= published.surveyedFrom);
  const draft = {
    id: randomUUID(),
    title: 'With what Sofia found',
    visitIds: ofChart.filter(({ status }) => status === 'closed').map(({ id }) => id),
    contourStepM: 0.5,
  };
  await idrisAsks.do('POST', `/lakes/${lakeId}/charts`, draft);
  await expect
    .poll(async () => (await idrisAsks.get(`/charts/${draft.id}/review`, ChartReview)).chart.build?.state, {
      timeout: 90_000,
    })
    .toBe('done');
  const { charts } = await idrisAsks.get(`/lakes/${lakeId}/charts`, ChartList);
  expect(charts.find(({ id }) => id === draft.id)?.status).toBe('draft');
  const { disagreements } = await idrisAsks.get(`/lakes/${lakeId}/disagreements`, DisagreementReviewList);
  const told = disagreements.find(({ pegNumber }) => pegNumber === 'FO7');
  const { soundings } = await idrisAsks.get(`/charts/${draft.id}`, ChartView);
  expect(soundings?.find(({ id }) => id === told?.id)).toMatchObject({ grade: 'C' });
  await idris.reload();
  await expect(idris.getByText(/In the draft “With what Sofia found”/)).toBeVisible();

  await sofia.goto('/tickets/disagreements');
  await expect(sofia.getByRole('list', { name: 'What you told' })).toContainText('accepted');
  await expect(sofia.getByText(/It counts in the next chart made/)).toBeVisible();
});
