// pnpm bench [--peers]: one line a figure, ours beside a peer, run turn by turn on the same input with a fixed seed.
import { benchAuth } from './auth';
import { chartComparison, previewComparison } from './chart.bench';
import { benchClient } from './client';
import { openDemoSite } from './demo-site';
import { isobathComparison } from './isobaths.bench';
import { krigingComparison } from './kriging.bench';
import { comparisonLine } from './measure';
import { benchPhotos } from './photos';
import { benchServer } from './server';
import { surfaceLines } from './surfaces.bench';
import { tinComparison } from './tin.bench';
import { twoWorkersComparison } from './two-workers.bench';

const withPeers = process.argv.includes('--peers');
const say = (line: string) => process.stdout.write(`${line}\n`);

say(await comparisonLine(isobathComparison()));
for (const start of [tinComparison, krigingComparison, twoWorkersComparison]) {
  const comparison = start(withPeers);
  say(await comparisonLine(comparison));
  comparison.stop();
}
for (const line of surfaceLines(withPeers)) say(line);
say(await comparisonLine(chartComparison()));
say(await comparisonLine(previewComparison()));
for (const line of await benchAuth()) say(line);
for (const line of await benchPhotos()) say(line);

await (await openDemoSite()).stop(); // builds what is not built, so that the next start finds nothing changed
const site = await openDemoSite();
try {
  for (const line of await benchServer(site)) say(line);
  for (const line of await benchClient(site.url)) say(line);
} finally {
  await site.stop();
}
