import { addDays, DAY_MS, startOfDay } from './zoned';

/** Zenith angles, degrees: the upper limb on a level horizon with standard refraction, and civil twilight. */
const RISE_ALTITUDE_DEG = -0.833;
const TWILIGHT_ALTITUDE_DEG = -6;
const STEP_MS = 5 * 60_000;
const CLOSE_MS = 500;

const RAD = Math.PI / 180;
const sin = (deg: number): number => Math.sin(deg * RAD);
const cos = (deg: number): number => Math.cos(deg * RAD);

/**
 * Altitude of the sun’s centre over the true horizon, degrees, without refraction. Good to about 0.01°, 1950 to 2050.
 * Source: J. Meeus, Astronomical Algorithms, 2nd ed. 1998, chapters 12 (sidereal time), 13 and 25 (low accuracy).
 */
export function sunAltitudeDeg(at: Date, [lon, lat]: readonly [number, number]): number {
  const days = at.getTime() / DAY_MS + 2_440_587.5 - 2_451_545;
  const t = days / 36_525;
  const meanLongitude = 280.46646 + t * (36_000.76983 + t * 0.0003032);
  const anomaly = 357.52911 + t * (35_999.05029 - t * 0.0001537);
  const centre =
    (1.914602 - t * (0.004817 + 0.000014 * t)) * sin(anomaly) +
    (0.019993 - 0.000101 * t) * sin(2 * anomaly) +
    0.000289 * sin(3 * anomaly);
  const node = 125.04 - 1934.136 * t;
  const longitude = meanLongitude + centre - 0.00569 - 0.00478 * sin(node);
  const obliquity = 23.439291 - 0.0130042 * t + 0.00256 * cos(node);
  const declination = Math.asin(sin(obliquity) * sin(longitude)) / RAD;
  const ascension = Math.atan2(cos(obliquity) * sin(longitude), cos(longitude)) / RAD;
  const sidereal = 280.46061837 + 360.98564736629 * days + 0.000387933 * t * t;
  const hourAngle = sidereal + lon - ascension;
  return Math.asin(sin(lat) * sin(declination) + cos(lat) * cos(declination) * cos(hourAngle)) / RAD;
}

/**
 * The sun over one civil day of a place: null for what does not happen between its two midnights. `state` says why,
 * where there is neither rise nor set: up all day, or not at all.
 */
export type SunTimes = {
  dawn: Date | null; // civil: the sun 6° under the horizon
  sunrise: Date | null;
  sunset: Date | null;
  dusk: Date | null;
  state: 'rises_and_sets' | 'always_up' | 'never_up';
};

/**
 * Sunrise, sunset and civil twilight of a civil day (YYYY-MM-DD in the zone) at a place ([longitude, latitude] WGS 84),
 * level horizon, sea level. Two minutes at worst below 60° of latitude; hills, trees and weather are not asked.
 */
export function sunTimes(day: string, place: readonly [number, number], zone: string): SunTimes {
  const from = startOfDay(day, zone).getTime();
  const until = startOfDay(addDays(day, 1), zone).getTime();
  const altitude = (at: number): number => sunAltitudeDeg(new Date(at), place);
  const times = Array.from({ length: Math.ceil((until - from) / STEP_MS) + 1 }, (_, step) =>
    Math.min(from + step * STEP_MS, until),
  );
  const altitudes = times.map(altitude);
  const crossings = (level: number): { up: Date | null; down: Date | null } => {
    let up: Date | null = null;
    let down: Date | null = null;
    for (let step = 1; step < times.length; step += 1) {
      const [start = from, end = until] = [times[step - 1], times[step]];
      const [last = level, next = level] = [altitudes[step - 1], altitudes[step]];
      if (last < level && next >= level) up ??= crossing(start, end, (at) => altitude(at) - level);
      if (last >= level && next < level) down = crossing(start, end, (at) => level - altitude(at));
    }
    return { up, down };
  };
  const sun = crossings(RISE_ALTITUDE_DEG);
  const twilight = crossings(TWILIGHT_ALTITUDE_DEG);
  const still = (altitudes[0] ?? 0) >= RISE_ALTITUDE_DEG ? 'always_up' : 'never_up';
  return {
    dawn: twilight.up,
    sunrise: sun.up,
    sunset: sun.down,
    dusk: twilight.down,
    state: sun.up || sun.down ? 'rises_and_sets' : still,
  };
}

/** Where a function that is below nought at `low` and not at `high` passes it, by halving, to the half second. */
function crossing(low: number, high: number, over: (at: number) => number): Date {
  let [before, after] = [low, high];
  while (after - before > CLOSE_MS) {
    const middle = (before + after) / 2;
    if (over(middle) >= 0) after = middle;
    else before = middle;
  }
  return new Date(Math.round((before + after) / 2));
}
