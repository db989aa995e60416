import type { Units } from '@mereward/shared/accounts/contract';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { depthNow, depthShown } from '@mereward/shared/charts/depth-words';
import {
  aimWords,
  bottomCaption,
  depthCaption,
  ownCountWords,
  provenance,
} from '@mereward/shared/charts/spot-figures';
import { markup, type Markup } from '../../http/markup';

/** The spots of a peg, numbered as on its map: reach, depth today, bottom, how sure, and what suits it. */
export function lightSpots(page: PegPageView, units: Units): Markup | null {
  const { spots } = page;
  if (spots === null) return null;
  if (spots.length === 0)
    return page.chart
      ? markup`<p>No spots are written up for this peg yet. The chart above is all there is so far.</p>`
      : markup`<p>No spots are written up for this peg yet.</p>`;
  return markup`<ol>${spots.map((spot, i) => markup`<li>${lightSpot([spot, i + 1], page, units)}</li>`)}</ol>`;
}

function lightSpot(
  [spot, number]: readonly [SpotView, number],
  { levelNow, chart, rigCaution }: PegPageView,
  units: Units,
): Markup {
  const water = { levelM: levelNow?.levelM ?? null, datumM: chart?.datumM ?? 0 };
  const shown = spot.depthM === null ? null : depthShown(spot.depthM, water);
  const bottom = spot.bottom === null ? null : BOTTOM_WORDS[spot.bottom];
  return markup`<h3>${number}. ${spot.name}</h3>
<p class="figure">${ownCountWords(spot, units)}, <span>${aimWords(spot)}</span></p>
${shown && markup`<p class="figure">${depthNow(shown.depthM, units.length)} <span>${depthCaption(spot, shown.when, units)}</span></p>`}
${bottom && markup`<p class="figure">${bottom.charAt(0).toUpperCase() + bottom.slice(1)} <span>${bottomCaption(spot)}</span></p>`}
<p>${spot.words}.</p>
<p class="soft">${provenance(spot)}</p>
${spot.water && !spot.water.own && markup`<p><strong>${spot.water.words}</strong></p>`}
${spot.note !== '' && markup`<p>${spot.note}</p>`}
${spot.presentation && markup`<p>What suits this bottom: ${spot.presentation} <strong>${rigCaution}</strong></p>`}`;
}

/** Other pegs' spots that lie in this peg's water, in a line each. */
export function lightNeighbours({ neighbourSpots }: PegPageView, units: Units): Markup | null {
  if (!neighbourSpots || neighbourSpots.length === 0) return null;
  return markup`<h2>Neighbours’ spots in this peg’s water</h2><ul>${neighbourSpots.map(
    ({ peg, spot }) =>
      markup`<li>${spot.name} (of peg ${peg.number}): ${ownCountWords(spot, units)}, ${aimWords(spot)}. ${spot.words}.</li>`,
  )}</ul>`;
}
