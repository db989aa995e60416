import { dayAndClock, dayName } from '../time/day-names';
import { elapsedHours, type Interval } from '../time/interval';
import { sunTimes } from '../time/sun';
import { addDays, civilTime, clockMovedSeconds, HOUR_MS, instantOf, startOfDay } from '../time/zoned';
import type { Duration, TicketChoice } from './contract';

/** Where a ticket's hours are counted: the lake's place ([longitude, latitude] WGS 84) and its IANA zone. */
export type LakePlace = { position: readonly [number, number]; zone: string };
/** A ticket's hours, half-open; `words` say both ends with their days, and what a moved clock does to them. */
export type TicketHours = Interval & { words: string };
export type Refusal = { refused: string };

const MINUTE_MS = 60_000;

/**
 * The hours of a ticket for what somebody chose, or why there are none. A day is the civil day at the lake on which it
 * starts. Times in the hour a clock leaves out or shows twice are read as RFC 5545 section 3.3.5 does.
 */
export function ticketInterval(
  duration: Duration,
  choice: Pick<TicketChoice, 'day' | 'start'>,
  place: LakePlace,
): TicketHours | Refusal {
  const hours = hoursOf(duration, choice, place);
  if ('refused' in hours) return hours;
  if (hours.until <= hours.from) return { refused: 'This ticket would end before it starts.' };
  const words =
    duration.kind === 'season' ? seasonWords(hours, place.zone) : hoursWords(hours, duration, place.zone);
  return { ...hours, words };
}

type Chosen = Pick<TicketChoice, 'day' | 'start'>;

function hoursOf(duration: Duration, choice: Chosen, place: LakePlace): Interval | Refusal {
  switch (duration.kind) {
    case 'fixed_hours':
    case 'night':
    case 'match':
      return clockHours(duration, choice.day, place.zone);
    case 'dawn_dusk':
      return sunHours(duration, choice.day, place);
    case 'elapsed':
      return chosenHours(duration, choice, place.zone);
    case 'season':
      return seasonHours(duration, choice.day, place.zone);
  }
}

function clockHours({ starts, ends }: { starts: string; ends: string }, day: string, zone: string): Interval {
  const lastDay = ends > starts ? day : addDays(day, 1);
  return { from: instantOf(`${day}T${starts}`, zone).at, until: instantOf(`${lastDay}T${ends}`, zone).at };
}

type DawnDusk = Extract<Duration, { kind: 'dawn_dusk' }>;

/** Under the midnight sun the whole day; where the sun stays down there is no such ticket. */
function sunHours(duration: DawnDusk, day: string, { position, zone }: LakePlace): Interval | Refusal {
  const sun = sunTimes(day, position, zone);
  const wholeDay = { from: startOfDay(day, zone), until: startOfDay(addDays(day, 1), zone) };
  if (sun.state === 'always_up') return wholeDay;
  if (sun.state === 'never_up')
    return { refused: `The sun does not rise here on ${dayName(day)}: there is no dawn to dusk that day.` };
  const from = sun.sunrise
    ? sun.sunrise.getTime() - duration.beforeSunriseMinutes * MINUTE_MS
    : wholeDay.from.getTime();
  const set = sun.sunset && (!sun.sunrise || sun.sunset > sun.sunrise) ? sun.sunset : null;
  const late = set ?? nextSunset(day, position, zone) ?? wholeDay.until;
  const until = late.getTime() + duration.afterSunsetMinutes * MINUTE_MS;
  return { from: wholeMinute(from), until: wholeMinute(until) };
}

/** A sunset past midnight is still the evening of the day before. */
function nextSunset(day: string, position: LakePlace['position'], zone: string): Date | null {
  const next = sunTimes(addDays(day, 1), position, zone);
  return next.sunset && next.sunrise && next.sunset < next.sunrise ? next.sunset : null;
}

const wholeMinute = (at: number): Date => new Date(Math.round(at / MINUTE_MS) * MINUTE_MS);

type Elapsed = Extract<Duration, { kind: 'elapsed' }>;
const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/** The clock times at which a ticket of chosen hours may start, HH:MM in order. */
export function allowedStarts({ startsFrom, startsUntil, startStepMinutes }: Elapsed): string[] {
  const starts: string[] = [];
  for (let minute = minutesOf(startsFrom); minute <= minutesOf(startsUntil); minute += startStepMinutes) {
    const [hours, minutes] = [Math.floor(minute / 60), minute % 60];
    starts.push(`${String(hours).padStart(2, '0')}:${String(minutes).padStart(2, '0')}`);
  }
  return starts;
}

function chosenHours(duration: Elapsed, { day, start }: Chosen, zone: string): Interval | Refusal {
  if (start === null) return { refused: 'Choose when to start.' };
  if (!allowedStarts(duration).includes(start)) {
    const { startsFrom, startsUntil, startStepMinutes: step } = duration;
    const often = step === 60 ? 'hour' : `${step} minutes`;
    const when =
      startsFrom === startsUntil
        ? `at ${startsFrom}`
        : `from ${startsFrom} to ${startsUntil}, every ${often}`;
    return { refused: `This ticket can’t start at ${start}. It starts ${when}.` };
  }
  const { at: from, kind } = instantOf(`${day}T${start}`, zone);
  if (kind === 'gap')
    return { refused: `The clock leaves ${start} out on ${dayName(day)}. Choose another start.` };
  const elapsed = new Date(from.getTime() + duration.hours * HOUR_MS);
  if (duration.clockChange === 'elapsed_hours') return { from, until: elapsed };
  return { from, until: clockLater(from, duration.hours, zone) };
}

/** The instant at which the clock shows so many hours more than it does now, moved clock or not. */
function clockLater(at: Date, hours: number, zone: string): Date {
  const shown = Date.parse(`${civilTime(at, zone)}Z`) + hours * HOUR_MS;
  return instantOf(new Date(shown).toISOString().slice(0, 19), zone).at;
}

type Season = Extract<Duration, { kind: 'season' }>;

/** From the day it is wanted, or the season's first, to the end of its last. */
function seasonHours({ firstDay, lastDay }: Season, day: string, zone: string): Interval | Refusal {
  if (day > lastDay) return { refused: `This season ended on ${dayName(lastDay)}.` };
  const first = day > firstDay ? day : firstDay;
  return { from: startOfDay(first, zone), until: startOfDay(addDays(lastDay, 1), zone) };
}

const seasonWords = ({ from, until }: Interval, zone: string): string => {
  const last = new Date(until.getTime() - 1);
  return `${dayName(civilTime(from, zone).slice(0, 10))} to ${dayName(civilTime(last, zone).slice(0, 10))}, both included`;
};

function hoursWords({ from, until }: Interval, duration: Duration, zone: string): string {
  const ends = `${dayAndClock(from.toISOString(), zone)} to ${dayAndClock(until.toISOString(), zone)}`;
  const movedS = clockMovedSeconds(from, until, zone);
  if (movedS === 0) return ends;
  const way = movedS > 0 ? 'forward' : 'back';
  const count = elapsedHours({ from, until });
  const hours = `${Number.isInteger(count) ? count : count.toFixed(1)} hours`;
  const rule =
    duration.kind === 'elapsed'
      ? duration.clockChange === 'elapsed_hours'
        ? ', counted in full, so the clock time it ends at differs'
        : ', ending when the clock shows the time agreed'
      : '';
  return `${ends}. The clock goes ${way} in between: this is ${hours}${rule}.`;
}
