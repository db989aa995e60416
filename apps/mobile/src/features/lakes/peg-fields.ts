import type { LonLat } from '@mereward/shared/geometry/plane';
import { PegDetails } from '@mereward/shared/lakes/contract';
import { z } from 'zod';
import { positionText, typedPosition } from '@/lib/position-text';
import { typedNumber, typedNumberOrNothing } from '@/lib/typed-schemas';

const shape = PegDetails.shape;
const whole = (what: string, min: number, max: number) =>
  typedNumber({ what, min, max }).pipe(z.int(`${what} is a whole number`));
const wholeOrNothing = (what: string, min: number, max: number) =>
  typedNumberOrNothing({ what, min, max }).pipe(z.int(`${what} is a whole number`).nullable());
const metres = (what: string, min: number, max: number) =>
  typedNumberOrNothing({ what, min, max, unit: 'm' });
const bearing = (what: string) =>
  typedNumber({ what, min: 0, max: 360, unit: 'degrees' }).transform((deg) => deg % 360);

const dayOrNothing = z.string().transform((day, context): string | null => {
  if (day === '' || z.iso.date().safeParse(day).success) return day || null;
  context.issues.push({ code: 'custom', message: 'Choose a day, or leave it empty', input: day });
  return z.NEVER;
});

/** A peg as it is typed: figures as text, places as latitude and longitude, hazards one a line. */
export const TypedPeg = PegDetails.extend({
  number: z.string().trim().min(1, 'Give the peg its number.').max(12, 'At most 12 letters.'),
  position: typedPosition('Tap the peg at the water’s edge on the lake, or type its latitude and longitude'),
  origin: typedPosition('Tap the origin mark on the lake, or type its latitude and longitude'),
  arcFromDeg: bearing('The left limit'),
  arcToDeg: bearing('The right limit'),
  longestCastM: metres('The longest cast', 5, 250),
  platform: shape.platform.extend({
    widthM: metres('The width', 0, 50),
    lengthM: metres('The length', 0, 50),
    heightM: metres('The height', -2, 10),
    inspectedOn: dayOrNothing,
  }),
  access: shape.access.extend({
    fromParkingM: wholeOrNothing('The distance', 0, 10_000),
    steps: wholeOrNothing('The number of steps', 0, 500),
  }),
  parking: shape.parking.extend({
    spaces: wholeOrNothing('The number of spaces', 0, 500),
    walkMinutes: wholeOrNothing('The walk', 0, 240),
  }),
  people: whole('The number of people', 1, 20),
  rods: whole('The number of rods', 1, 40),
  shelters: whole('The number of shelters', 0, 20),
  overheadLine: shape.overheadLine.extend({
    distanceM: metres('The distance', 0, 500),
    heightM: metres('The height', 0, 100),
    document: z.string().trim().max(200, 'At most 200 letters.'),
  }),
  hazards: z.string().transform((text, context): string[] => {
    const hazards = text.split('\n').flatMap((line) => line.trim() || []);
    const long = hazards.find((hazard) => hazard.length > 120);
    const message = long ? 'Each hazard in at most 120 letters' : 'At most 30 hazards';
    if (long || hazards.length > 30) context.issues.push({ code: 'custom', message, input: text });
    return hazards;
  }),
  statusUntil: dayOrNothing,
});
export type TypedPeg = z.input<typeof TypedPeg>;

export type HoldsPeg = { details: TypedPeg };

const text = (value: number | null): string => (value === null ? '' : String(value));

/** A peg's details laid into the form. */
export const typedPeg = (details: PegDetails): TypedPeg => ({
  ...details,
  position: positionText(details.position),
  origin: positionText(details.origin),
  arcFromDeg: text(details.arcFromDeg),
  arcToDeg: text(details.arcToDeg),
  longestCastM: text(details.longestCastM),
  platform: {
    ...details.platform,
    widthM: text(details.platform.widthM),
    lengthM: text(details.platform.lengthM),
    heightM: text(details.platform.heightM),
    inspectedOn: details.platform.inspectedOn ?? '',
  },
  access: {
    ...details.access,
    fromParkingM: text(details.access.fromParkingM),
    steps: text(details.access.steps),
  },
  parking: {
    ...details.parking,
    spaces: text(details.parking.spaces),
    walkMinutes: text(details.parking.walkMinutes),
  },
  people: text(details.people),
  rods: text(details.rods),
  shelters: text(details.shelters),
  overheadLine: {
    ...details.overheadLine,
    distanceM: text(details.overheadLine.distanceM),
    heightM: text(details.overheadLine.heightM),
    document: details.overheadLine.document ?? '',
  },
  hazards: details.hazards.join('\n'),
  statusUntil: details.statusUntil ?? '',
});

/** What a new peg starts as. What nobody has looked at is unknown, never "none". */
export const NEW_PEG: TypedPeg = {
  number: '',
  name: '',
  position: '',
  origin: '',
  originMark: '',
  originFixedBy: 'phone_gnss',
  originMarked: false,
  arcFromDeg: '',
  arcToDeg: '',
  waterWords: '',
  longestCastM: '',
  platform: { kind: 'none', widthM: '', lengthM: '', heightM: '', inspectedOn: '', state: '' },
  access: {
    fromParkingM: '',
    surface: '',
    steepest: '',
    steps: '',
    gates: '',
    barrow: 'unknown',
    winter: '',
  },
  stepFree: { kind: 'unknown', facts: '' },
  parking: { bay: '', spaces: '', walkMinutes: '', vehicleLimit: '', winterClosure: '' },
  people: '1',
  rods: '2',
  shelters: '1',
  overheadLine: {
    kind: 'unknown',
    distanceM: '',
    heightM: '',
    operator: '',
    signFitted: false,
    fishing: 'restricted',
    document: '',
  },
  hazards: '',
  tackleLimits: '',
  notesPublic: '',
  notesMembers: '',
  notesStaff: '',
  status: 'open',
  statusReason: '',
  statusUntil: '',
  emergency: { gridReference: '', throwLine: '', ambulanceGate: '', sayThis: '' },
};

/** Where a peg stands and which way it looks, as far as it is typed yet. */
export type PegPlaces = {
  position: LonLat | null;
  origin: LonLat | null;
  fromDeg: number | null;
  toDeg: number | null;
};
