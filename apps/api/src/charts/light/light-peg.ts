import type { Units } from '@mereward/shared/accounts/contract';
import { ageWords } from '@mereward/shared/charts/chart-age';
import { overheadCaution } from '@mereward/shared/charts/cautions';
import type { PegPageView } from '@mereward/shared/charts/contract';
import { levelLine } from '@mereward/shared/charts/depth-words';
import { layerReasons } from '@mereward/shared/charts/layer-reasons';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { PegDetails } from '@mereward/shared/lakes/contract';
import {
  emergencyFacts,
  pegFacts,
  pegTitle,
  statusWords,
  wayFacts,
  type PegFact,
} from '@mereward/shared/lakes/peg-facts';
import { dayAndClock, dayRange } from '@mereward/shared/time/day-names';
import { length } from '@mereward/shared/units/length-words';
import { FOOT_M } from '@mereward/shared/units/length';
import { markup, Markup } from '../../http/markup';
import { lightDocument, type LightDocument } from './light-frame';
import { lightMap, type LightMap } from './light-map';
import { lightNeighbours, lightSpots } from './light-spots';
import { wishQuery, type LightWish } from './light-wish';

/** A peg's page for whoever has no script, no time or one bar of signal; it says what the peg's screen says. */
export function lightPeg(page: PegPageView, wish: LightWish): LightDocument {
  const { units } = wish;
  const details = PegDetails.parse(page.details);
  const map = lightMap(page, units);
  const body = markup`<h1>${pegTitle(page)}</h1>
${warnings(details)}
${water(map)}
${lightSpots(page, units)}
${lightNeighbours(page, units)}
${page.spots && page.spots.length > 0 && sticks(wish)}
<p class="screen"><a class="go" href="${wishQuery(otherUnit(units))}">${units.length === 'm' ? 'Show it in feet' : 'Show it in metres'}</a></p>
${caption(page, units)}
${missing(page)}
${details.notesPublic !== '' && markup`<p>${details.notesPublic}</p>`}
${hazards(details)}
${facts('Getting there', wayFacts(details))}
${facts('The peg', pegFacts(details, units))}
${emergency(page, details)}
${onward(page)}`;
  return lightDocument({
    title: `${pegTitle(page)} · ${page.lake.name}`,
    over: `${page.lake.name} · ${page.fishery.name}`,
    head: markup`<link rel="canonical" href="${page.shortUrl}">`,
    body,
    ...(map ? { day: map.day, dusk: map.dusk } : {}),
  });
}

const STATUS_SHAPE = { open: '▲', limited: '◆', closed: '✕' } as const;

/** What may keep an angler from this peg: never behind a press, always before anything else. */
function warnings(details: PegDetails): Markup {
  const { status, overheadLine } = details;
  const overhead = overheadCaution(details);
  const danger = overheadLine.kind !== 'unknown' && overheadLine.fishing !== 'ok';
  return markup`<p class="state ${status}"><span aria-hidden="true">${STATUS_SHAPE[status]}</span> ${status}</p>
${status !== 'open' && note({ danger: status === 'closed', heading: `This peg is ${status}` }, [statusWords(details)])}
${overhead && note({ danger, heading: 'Power line overhead' }, [overhead, operatorWords(overheadLine)])}`;
}

const operatorWords = ({ operator }: PegDetails['overheadLine']): string =>
  operator === '' ? '' : `Network operator: ${operator}.`;

type NoteHead = { danger: boolean; heading: string };

const note = ({ danger, heading }: NoteHead, lines: readonly string[]): Markup =>
  markup`<div class="note${danger ? ' danger' : ''}"><h2>${heading}</h2>${lines.filter(Boolean).map((words) => markup`<p>${words}</p>`)}</div>`;

const water = (map: LightMap | null): Markup => markup`<h2>In front of the peg</h2>
${map ? markup`<figure>${new Markup(map.svg)}</figure>` : markup`<p>No chart of this water is published yet.</p>`}`;

const otherUnit = (units: Units): Units => ({ ...units, length: units.length === 'm' ? 'ft' : 'm' });

const USUAL = [12 * FOOT_M, 13 * FOOT_M, 10 * FOOT_M, 2, 3 * FOOT_M];

/** Another spacing of sticks: typed and sent back to this page, or one of the usual ones. */
function sticks({ units, sticksFault }: LightWish): Markup {
  const now = stickWords(units.stickSpacingM);
  const others = USUAL.filter((spacingM) => Math.abs(spacingM - units.stickSpacingM) > 1e-6);
  return markup`<div class="screen">
${sticksFault && markup`<p class="state limited" role="alert">${sticksFault}</p>`}
<form method="get"><label for="sticks">How far apart are your own distance sticks? The counts above are for ${now}.</label>
<input id="sticks" name="sticks" autocomplete="off" maxlength="12" value="${now}">
${units.length === 'ft' && markup`<input type="hidden" name="in" value="ft">`}<button>Count on these</button></form>
<p>${others.map((stickSpacingM) => markup`<a class="go" href="${wishQuery({ ...units, stickSpacingM })}">${stickWords(stickSpacingM)}</a>`)}</p></div>`;
}

const AGE_SHAPE = { current: '▲', ageing: '○', old: '◆', changed: '◆' } as const;

/** Which chart it is, when and at what level, and what it must not be used for. */
function caption(page: PegPageView, units: Units): Markup | null {
  const { chart, levelNow, fishery } = page;
  if (!chart) return null;
  const facts = [
    `Chart ${chart.version}`,
    `surveyed ${dayRange(chart.surveyedFrom, chart.surveyedTo)}`,
    `datum ${length(chart.datumM, units, 2)}`,
    levelLine(levelNow, levelNow ? dayAndClock(levelNow.at, fishery.zone) : ''),
  ];
  const overhead = overheadCaution(PegDetails.parse(page.details)); // stands at the head already
  const cautions = page.cautions.filter((words) => words !== overhead);
  return markup`<p><strong>${facts.join(' · ')}</strong></p>
<p class="state ${chart.age}"><span aria-hidden="true">${AGE_SHAPE[chart.age]}</span> ${ageWords(chart.age, chart.changes)}</p>
${cautions.map((words) => markup`<p>${words}</p>`)}
<p>Not for navigation.</p>`;
}

function missing({ layerNotes }: PegPageView): Markup | null {
  const reasons = layerReasons(layerNotes);
  return reasons.length === 0 ? null : note({ danger: false, heading: 'Not shown here' }, reasons);
}

const hazards = ({ hazards: all }: PegDetails): Markup | null =>
  all.length === 0
    ? null
    : markup`<h2>Hazards</h2><ul>${all.map((hazard) => markup`<li>${hazard}</li>`)}</ul>`;

function facts(heading: string, all: readonly PegFact[]): Markup | null {
  const known = all.filter(({ fact }) => fact !== null && fact !== '');
  if (known.length === 0) return null;
  return markup`<h2>${heading}</h2><dl>${known.map(({ term, fact }) => markup`<div><dt>${term}</dt><dd>${fact}</dd></div>`)}</dl>`;
}

function emergency(page: PegPageView, details: PegDetails): Markup {
  const { sayThis } = details.emergency;
  const say = sayThis === '' ? '' : `Say: “${sayThis}”`;
  return markup`${note({ danger: true, heading: 'In an emergency ring 999 or 112' }, [page.emergencyWords, say])}
${facts('Help and the way in', emergencyFacts(page, details.emergency))}`;
}

function onward({ id, chart, photos, cardUrl, shortUrl }: PegPageView): Markup {
  const pictures = photos.length > 0 ? ', with photos' : '';
  return markup`<h2>More</h2>
<p class="screen"><a class="go" href="/water/pegs/${id}">This peg in the app${pictures}</a>
${chart && markup`<a class="go" href="/water/charts/${chart.id}?peg=${id}">The whole chart</a>`}
<a class="go" href="${cardUrl}">Card to print (PDF)</a></p>
<p class="soft">This page is open to everybody. Signed in to the app, you read what is kept for members and for ticket holders too. Its address: ${shortUrl}</p>`;
}
