import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import type {
  GaugeBoardDetails,
  LakeDetails,
  MarkDetails,
  PegDetails,
} from '@mereward/shared/lakes/contract';
import { fromPlane, pointAlong, type Point } from '@mereward/shared/geometry/plane';
import { demoId } from './random';
import { farOstlePlaces } from './places';
import { FAR_OSTLE, OSTLE_POOL, SEDGE_CUT, type DemoWater } from './waters';

export const OSTLEMERE_ID = demoId('fishery');

export const OSTLEMERE: FisheryDetails = {
  name: 'Ostlemere Waters',
  legalEntity: 'Ostlemere Waters (invented for the demo)',
  address: 'The Lodge, Ostle Lane, Vale of Wend',
  postcode: 'XX1 1XX',
  gridReference: 'XX 420 318',
  position: [FAR_OSTLE.centre[0], FAR_OSTLE.centre[1]],
  jurisdiction: 'ENG',
  zone: 'Europe/London',
  vatStatus: 'registered',
  vatNumber: '',
  officeContact: 'office@ostlemere.example',
  dutyPhone: '01632 960 114', // of the range kept free for drama
  meetingPoint: 'The white gate on Ostle Lane, where the bailiff meets the ambulance',
  opening: 'Gate open from an hour before sunrise to an hour after sunset; nights on Far Ostle by ticket',
  facilities: 'Toilets and tap at the lodge; no power on the bank',
  conduct: 'Dogs on leads. No fires; stoves off the ground. Cars stay in the bays.',
  gateCode: '2417 then turn',
};

export type DemoLake = {
  id: string;
  water: DemoWater;
  prefix: string;
  details: LakeDetails;
  board: { id: string; details: GaugeBoardDetails };
  marks: { id: string; details: MarkDetails; at: Point }[];
  pegs: { id: string; details: PegDetails; origin: Point; facingDeg: number }[];
};

type LakePlan = {
  name: string;
  prefix: string;
  water: DemoWater;
  pegCount: number;
  longestCastM: number;
  datumM: number;
  lake: Partial<LakeDetails>;
  marks: { name: string; permanence: MarkDetails['permanence']; at: Point }[];
};

const round7 = (at: readonly [number, number]): [number, number] => [
  Number(at[0].toFixed(7)),
  Number(at[1].toFixed(7)),
];

function lakeDetails(plan: LakePlan): LakeDetails {
  return {
    name: plan.name,
    kind: 'gravel_pit',
    outline: plan.water.polygon,
    outlineFrom: { way: 'plan', withinM: 1.5 },
    nights: false,
    maxPeople: plan.pegCount * 2,
    maxRods: plan.pegCount * 3,
    stockClass: 'improved',
    ownership: 'owned',
    designations: '',
    publicPathBeside: false,
    inflowOutflow: 'A field drain in, a boarded sluice out',
    emergencyAccess: 'By the white gate; the track carries an ambulance as far as the lodge',
    phoneSignal: 'One bar at the lodge, none under the far bank',
    datumM: plan.datumM,
    maxGapM: 12,
    longestCastM: plan.longestCastM,
    audiences: { depth: 'public', bottom: 'public', spots: 'public', soundings: 'members' },
    ...plan.lake,
  };
}

/** Pegs at even steps along the shore, clockwise from the north-west, as a bailiff walks them. */
function pegsOf(plan: LakePlan): DemoLake['pegs'] {
  const clockwise = [...plan.water.outline.shore].reverse();
  const start = clockwise.reduce(
    (best, p, i) => (p.yM - p.xM > clockwise[best]!.yM - clockwise[best]!.xM ? i : best),
    0,
  );
  return Array.from({ length: plan.pegCount }, (_, i) => {
    const at = (start + Math.round((i * clockwise.length) / plan.pegCount)) % clockwise.length;
    const edge = clockwise[at]!;
    const before = clockwise[(at + clockwise.length - 2) % clockwise.length]!;
    const after = clockwise[(at + 2) % clockwise.length]!;
    // Walking clockwise the water is on the right hand.
    const facingDeg =
      (90 + (Math.atan2(after.xM - before.xM, after.yM - before.yM) * 180) / Math.PI + 360) % 360;
    const origin = pointAlong(edge, facingDeg + 180, 1);
    return {
      id: demoId(`peg ${plan.prefix}${i + 1}`),
      origin,
      facingDeg,
      details: pegDetails(plan, i + 1, { edge, origin, facingDeg }),
    };
  });
}

const PEG_NAMES: Record<string, string> = {
  FO3: 'The Willows',
  FO7: 'The Point',
  FO12: 'Sandy Lip',
  FO17: 'Long Bar',
  FO21: 'West Bay',
  OP4: 'Lodge Corner',
};

function pegDetails(
  plan: LakePlan,
  n: number,
  at: { edge: Point; origin: Point; facingDeg: number },
): PegDetails {
  const number = `${plan.prefix}${n}`;
  const tenths = (deg: number) => (Math.round((((deg % 360) + 360) % 360) * 10) / 10) % 360;
  return {
    number,
    name: PEG_NAMES[number] ?? '',
    position: round7(fromPlane(plan.water.centre, at.edge)),
    origin: round7(fromPlane(plan.water.centre, at.origin)),
    originMark: 'Painted dot on the peg board: left foot on the dot',
    originFixedBy: 'tape_or_plan',
    originMarked: true,
    arcFromDeg: tenths(at.facingDeg - 25),
    arcToDeg: tenths(at.facingDeg + 25),
    waterWords: 'To half way, and to the line half way to each neighbour',
    longestCastM: null,
    platform: {
      kind: n % 3 === 0 ? 'timber' : 'bank',
      widthM: 2.4,
      lengthM: 3,
      heightM: 0.3,
      inspectedOn: null,
      state: 'Sound; non-slip mesh',
    },
    access: {
      fromParkingM: 60 + 35 * Math.min(n, plan.pegCount - n),
      surface: n % 4 === 0 ? 'grass, soft after rain' : 'rolled stone',
      steepest: n % 5 === 0 ? '1 in 8' : 'level',
      steps: n % 5 === 0 ? 4 : 0,
      gates: n < 4 ? 'one kissing gate' : 'none',
      barrow: n % 5 === 0 ? 'no' : 'yes',
      winter: n % 4 === 0 ? 'deep mud in winter' : '',
    },
    stepFree:
      n === 1
        ? {
            kind: 'measured_suitable',
            facts:
              'Path 1.5 m wide, 1 in 20 at most; turning circle 1.8 m; edge board 100 mm; bay at 40 m; toilet at 120 m',
          }
        : {
            kind: n % 5 === 0 ? 'not_suitable' : 'unknown',
            facts: n % 5 === 0 ? 'Four steps down the bank' : '',
          },
    parking: {
      bay: n <= plan.pegCount / 2 ? 'Lodge' : 'Far gate',
      spaces: 12,
      walkMinutes: 2 + (n % 6),
      vehicleLimit: '',
      winterClosure: '',
    },
    people: 2,
    rods: 3,
    shelters: plan.lake.nights ? 1 : 0,
    overheadLine:
      number === 'FO24'
        ? {
            kind: 'present',
            distanceM: 22,
            heightM: 8,
            operator: 'Wend Networks',
            signFitted: true,
            fishing: 'no_fishing',
          }
        : { kind: 'none', distanceM: null, heightM: null, operator: '', signFitted: false, fishing: 'ok' },
    hazards: hazardsOf(number, n),
    tackleLimits:
      'Barbless hooks. Leads that come off if the line breaks. No braid as main line when fishing.',
    notesPublic:
      number === 'FO7' ? 'Looks across the lake to the tall poplar. Windy in a south-westerly.' : '',
    notesMembers: '',
    notesStaff: number === 'FO7' ? 'Origin dot repainted in spring.' : '',
    status: number === 'FO20' || number === 'FO24' ? 'closed' : 'open',
    statusReason:
      number === 'FO20'
        ? 'Bank slipped; being made good'
        : number === 'FO24'
          ? 'Overhead line within 30 m'
          : '',
    statusUntil: null,
    emergency: {
      gridReference: 'XX 420 318',
      throwLine: n % 2 ? 'On the post at this peg' : 'On the post one peg back towards the lodge',
      ambulanceGate: 'White gate, Ostle Lane',
      sayThis: `Ostlemere Waters, ${plan.name}, peg ${n}; meet the bailiff at the white gate on Ostle Lane`,
    },
  };
}

function hazardsOf(number: string, n: number): string[] {
  const every = ['Deep margin: over a metre at arm’s length'];
  if (number === 'FO21') return ['Soft silt: do not wade', 'Submerged stakes to the left'];
  if (number === 'FO24') return ['Overhead line: look up, carry rods flat'];
  return n % 5 === 0 ? [...every, 'Steep bank, four steps'] : n % 3 === 0 ? every : [];
}

function planned(plan: LakePlan): DemoLake {
  return {
    id: demoId(`lake ${plan.prefix}`),
    water: plan.water,
    prefix: plan.prefix,
    details: lakeDetails(plan),
    board: {
      id: demoId(`board ${plan.prefix}`),
      details: {
        code: `${plan.prefix}-G1`,
        kind: 'board',
        position: round7(fromPlane(plan.water.centre, plan.water.outline.shore[10]!)),
        unit: 'm',
        higherNumberHigherWater: true,
        normalLowM: plan.datumM - 0.07,
        normalHighM: plan.datumM + 0.08,
        alarmLowM: null,
        alarmHighM: plan.datumM + 0.48,
        lastCleanedOn: null,
        isDatumBoard: true,
      },
    },
    marks: plan.marks.map(({ name, permanence, at }, i) => ({
      id: demoId(`mark ${plan.prefix} ${name}`),
      at,
      details: {
        code: `M${i + 1}`,
        name,
        position: round7(fromPlane(plan.water.centre, at)),
        fixedBy: 'plan',
        sigmaM: 1,
        permanence,
        nightNote: permanence === 'permanent' ? 'Stands clear on the skyline' : '',
      },
    })),
    pegs: pegsOf(plan),
  };
}

export const FAR_OSTLE_LAKE = planned({
  name: 'Far Ostle',
  prefix: 'FO',
  water: FAR_OSTLE,
  pegCount: 24,
  longestCastM: 95,
  datumM: 0.62,
  lake: { nights: true, kind: 'gravel_pit', places: farOstlePlaces() },
  marks: [
    { name: 'dead oak', permanence: 'tree', at: { xM: -150, yM: 118 } },
    { name: 'white gate', permanence: 'pole', at: { xM: 10, yM: 150 } },
    { name: 'pump-house chimney', permanence: 'permanent', at: { xM: 232, yM: -58 } },
    { name: 'boathouse gable', permanence: 'permanent', at: { xM: 70, yM: -142 } },
    { name: 'tall poplar', permanence: 'tree', at: { xM: -98, yM: -150 } },
    { name: 'barn end', permanence: 'permanent', at: { xM: -220, yM: 12 } },
    { name: 'lodge chimney', permanence: 'permanent', at: { xM: 168, yM: 112 } },
  ],
});

export const OSTLE_POOL_LAKE = planned({
  name: 'Ostle Pool',
  prefix: 'OP',
  water: OSTLE_POOL,
  pegCount: 14,
  longestCastM: 60,
  datumM: 0.45,
  lake: {
    kind: 'estate_lake',
    stockClass: 'intensive',
    audiences: { depth: 'public', bottom: 'ticket', spots: 'ticket', soundings: 'staff' },
  },
  marks: [
    { name: 'lodge gable', permanence: 'permanent', at: { xM: -90, yM: 40 } },
    { name: 'leaning willow', permanence: 'tree', at: { xM: 20, yM: 96 } },
    { name: 'water tower', permanence: 'permanent', at: { xM: 118, yM: -10 } },
    { name: 'stile', permanence: 'pole', at: { xM: 0, yM: -92 } },
  ],
});

export const SEDGE_CUT_LAKE = planned({
  name: 'Sedge Cut',
  prefix: 'SC',
  water: SEDGE_CUT,
  pegCount: 8,
  longestCastM: 35,
  datumM: 0.5,
  lake: { kind: 'purpose_dug' },
  marks: [{ name: 'red door', permanence: 'permanent', at: { xM: 92, yM: 4 } }],
});

export const DEMO_LAKES: readonly DemoLake[] = [FAR_OSTLE_LAKE, OSTLE_POOL_LAKE, SEDGE_CUT_LAKE];
