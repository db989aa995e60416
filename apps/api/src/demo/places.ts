import { fromPlane } from '@mereward/shared/geometry/plane';
import type { LakePlace } from '@mereward/shared/lakes/place-contract';
import { demoId } from './random';
import { FAR_OSTLE } from './waters';

type Planned = Pick<LakePlace, 'kind' | 'name'> &
  Partial<Pick<LakePlace, 'note' | 'audience'>> & { at: readonly (readonly [xM: number, yM: number])[] };

/** What stands at Far Ostle beside its pegs and marks, in its plane. The wire passes 22 m from FO24 and 30 m from no other. */
const PLACES: readonly Planned[] = [
  { kind: 'parking', name: 'Lodge car park', at: [[178, 96]], note: '12 bays, rolled stone' },
  { kind: 'parking', name: 'Far gate bays', at: [[-176, -104]], note: 'Closed in winter' },
  { kind: 'gate', name: 'White gate, Ostle Lane', at: [[22, 146]], note: 'Ambulances are met here' },
  { kind: 'gate', name: 'Works gate', at: [[-212, 30]], audience: 'staff', note: 'Key in the lodge' },
  { kind: 'throw_line', name: 'Ring by peg 7', at: [[123, 74]] },
  { kind: 'throw_line', name: 'Ring by peg 12', at: [[203, -46]] },
  { kind: 'throw_line', name: 'Ring by peg 17', at: [[-9, -102]] },
  { kind: 'throw_line', name: 'Ring by peg 23', at: [[-165, 8]] },
  { kind: 'hazard', name: 'Submerged stakes', at: [[-150, -28]], note: 'Old moorings, under water at datum' },
  { kind: 'hazard', name: 'Bank slipped', at: [[-180, -60]], note: 'Fenced until it is made good' },
  {
    kind: 'overhead_line',
    name: 'Wend Networks, 11 kV',
    at: [
      [-195, 150],
      [-181, 48],
      [-260, 15],
    ],
  },
];

export const farOstlePlaces = (): LakePlace[] =>
  PLACES.map(({ kind, name, at, note = '', audience = 'public' }) => ({
    id: demoId(`place FO ${name}`),
    kind,
    name,
    at: at.map(([xM, yM]): [number, number] => {
      const [lon, lat] = fromPlane(FAR_OSTLE.centre, { xM, yM });
      return [Number(lon.toFixed(7)), Number(lat.toFixed(7))];
    }),
    note,
    audience,
  }));
