import { useCallback, useMemo, useState } from 'react';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { pointAlong, toPlane, type Point } from '@mereward/shared/geometry/plane';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { useController, useFormContext } from 'react-hook-form';
import { View } from 'react-native';
import { ChoiceGrid } from '@/components/choice-grid';
import { FormField } from '@/components/form-field';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { lakeBackdrop, waterLines } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw, type Handle } from '@/features/charts/lake-canvas';
import { placeOf } from '@/features/charts/outline-drawing';
import { HANDLE_M, offeredStance, stanceMarks, type Stance } from '@/features/charts/peg-arc';
import { planeOutline } from '@/features/charts/readied-chart';
import type { HoldsPeg } from '@/features/lakes/peg-fields';
import { positionText, readPosition } from '@/lib/position-text';

const STEPS = [
  { key: 'edge', label: 'Water’s edge' },
  { key: 'origin', label: 'Origin mark' },
  { key: 'from', label: 'Left limit' },
  { key: 'to', label: 'Right limit' },
] as const;
type Step = (typeof STEPS)[number]['key'];

const NEXT: Readonly<Record<Step, Step>> = { edge: 'origin', origin: 'from', from: 'to', to: 'to' };
const ROUND_M = 70; // half of what is shown round a peg that stands already

type Props = { lake: LakeView; pegId: string };

const degrees = (text: string): number | null => {
  const deg = Number(text.replace(',', '.'));
  return text.trim() === '' || Number.isNaN(deg) || deg < 0 || deg > 360 ? null : deg;
};

/** Where the peg is, where one stands and which water is its own: tapped and dragged on the lake, or typed. */
export function PegPlaces({ lake, pegId }: Props) {
  const { control } = useFormContext<HoldsPeg>();
  const { origin: middle } = lake;
  const edge = useController({ control, name: 'details.position' }).field;
  const origin = useController({ control, name: 'details.origin' }).field;
  const from = useController({ control, name: 'details.arcFromDeg' }).field;
  const to = useController({ control, name: 'details.arcToDeg' }).field;
  const [step, setStep] = useState<Step>('edge');
  const stance = useMemo((): Stance => {
    const at = (text: string): Point | null => {
      const place = readPosition(text);
      return place && toPlane(middle, place);
    };
    return {
      edge: at(edge.value),
      origin: at(origin.value),
      fromDeg: degrees(from.value),
      toDeg: degrees(to.value),
    };
  }, [middle, edge.value, origin.value, from.value, to.value]);
  const [frame] = useState(() => frameRound(stance.edge, lake));
  const under = useMemo(() => lakeBackdrop(lake, { water: true, exceptPegId: pegId }), [lake, pegId]);
  const over = useCallback<Draw>(({ palette }) => stanceMarks(stance, palette), [stance]);

  const set = (what: string, point: Point): void => {
    if (what === 'edge') setEdge(point);
    if (what === 'origin') origin.onChange(positionText(placeOf(middle, point)));
    const stand = readPosition(origin.value);
    if (!stand || (what !== 'from' && what !== 'to')) return;
    const { bearingDeg } = geodesicBetween(stand, placeOf(middle, point));
    (what === 'from' ? from : to).onChange(String(Math.round(bearingDeg) % 360));
  };
  const setEdge = (point: Point): void => {
    edge.onChange(positionText(placeOf(middle, point)));
    const offered =
      origin.value === '' ? offeredStance(planeOutline(lake.details.outline, middle), point) : null;
    if (!offered) return;
    origin.onChange(positionText(placeOf(middle, offered.origin)));
    if (from.value === '') from.onChange(String(offered.fromDeg));
    if (to.value === '') to.onChange(String(offered.toDeg));
  };
  return (
    <Section
      title="Its place and its water"
      note="Tap the water’s edge; the origin mark and the limits are then offered: look at each and drag it to where it is. Or type them."
    >
      <ChoiceGrid
        label="A tap sets"
        choices={STEPS}
        value={step}
        onChange={setStep}
        columns={4}
        bank={false}
      />
      <LakeCanvas
        label={`${lake.details.name}: the peg’s place and its water`}
        frame={frame}
        under={under}
        over={over}
        handles={handlesOf(stance)}
        onTap={(point) => {
          set(step, point);
          setStep(NEXT[step]);
        }}
        onMove={set}
      />
      <FormField control={control} name="details.position" label="Water’s edge: latitude, longitude" />
      <FormField control={control} name="details.origin" label="Origin mark: latitude, longitude" />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        <View style={{ flexGrow: 1, flexBasis: 160 }}>
          <FormField
            control={control}
            name="details.arcFromDeg"
            label="Left limit, degrees"
            hint="True bearing, as seen looking over the water."
            keypad="decimal"
          />
        </View>
        <View style={{ flexGrow: 1, flexBasis: 160 }}>
          <FormField
            control={control}
            name="details.arcToDeg"
            label="Right limit, degrees"
            hint="The arc runs clockwise from left to right."
            keypad="decimal"
          />
        </View>
      </View>
    </Section>
  );
}

function handlesOf({ edge, origin, fromDeg, toDeg }: Stance): Handle[] {
  const limit = (id: Step, bearingDeg: number | null): Handle[] =>
    origin && bearingDeg !== null ? [{ id, ...pointAlong(origin, bearingDeg, HANDLE_M) }] : [];
  return [
    ...(edge ? [{ id: 'edge', ...edge }] : []),
    ...(origin ? [{ id: 'origin', ...origin }] : []),
    ...limit('from', fromDeg),
    ...limit('to', toDeg),
  ];
}

function frameRound(edge: Point | null, lake: LakeView) {
  if (!edge) return waterLines(lake);
  return [[edge.xM - ROUND_M, edge.yM - ROUND_M, edge.xM + ROUND_M, edge.yM + ROUND_M]];
}
