import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { pictureCautions, worstPoint } from '@mereward/shared/lakes/picture-placing';
import { metresPerPixel } from '@mereward/shared/geometry/picture-fit';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Field } from '@/components/field';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { PlaceCanvas } from '@/features/charts/place-canvas';
import type { DraftPoint, Fitting } from '@/features/lakes/picture-draft';
import { cautionWords, knownPlaces, OTHER_PLACE, placeChoices } from '@/features/lakes/picture-words';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { positionText, readPosition } from '@/lib/position-text';

type ListProps = {
  points: readonly DraftPoint[];
  chosen: number | null;
  fitting: Fitting | null;
  onChoose: (at: number) => void;
};

/** The points set so far, each with how far the fit misses it. */
export function PointList({ points, chosen, fitting, onChoose }: ListProps) {
  const units = useUnits();
  const missed = (at: number): string => {
    const missedM = fitting?.missedM[at] ?? null;
    if (missedM !== null) return `missed by ${length(missedM, units, 2)}`;
    return readPosition(points[at]?.position ?? '') ? '' : 'where is it?';
  };
  return (
    <List label="Known points">
      {points.map(({ label }, at) => (
        <Row
          key={at}
          title={`${String(at + 1)}. ${label || 'a point without a place'}`}
          end={missed(at)}
          chosen={at === chosen}
          onPress={() => onChoose(at)}
        />
      ))}
    </List>
  );
}

type PointProps = {
  lake: LakeView;
  at: number;
  point: DraftPoint;
  errors: { label?: string | undefined; position?: string | undefined };
  onChange: (point: DraftPoint) => void;
  onRemove: () => void;
};

/** One point: what it is, where it is known to be, and its pixel. */
export function PointFields({ lake, at, point, errors, onChange, onRemove }: PointProps) {
  const known = knownPlaces(lake);
  const same = known.find(({ position }) => position === point.position);
  const [elsewhere, setElsewhere] = useState(point.position !== '' && !same);
  const name = `Point ${String(at + 1)}`;
  const choose = (key: string): void => {
    const place = known.find((each) => each.key === key);
    setElsewhere(key === OTHER_PLACE);
    if (place) onChange({ ...point, label: place.label.slice(0, 60), position: place.position });
    else onChange({ ...point, ...(same ? { label: '', position: '' } : {}) });
  };
  return (
    <View style={{ gap: space.small }}>
      <Select
        label={`${name}: what is it?`}
        choices={placeChoices(known)}
        value={same && !elsewhere ? same.key : elsewhere ? OTHER_PLACE : null}
        onChange={choose}
        unset="Choose a place you know"
        error={elsewhere || same ? undefined : errors.position}
      />
      {elsewhere ? (
        <>
          <Field
            label={`${name}: its name`}
            value={point.label}
            onChange={(label) => onChange({ ...point, label })}
            error={errors.label}
          />
          <Field
            label={`${name}: latitude, longitude`}
            hint="In degrees (WGS 84), as a good map or a GNSS receiver gives it."
            value={point.position}
            onChange={(position) => onChange({ ...point, position })}
            error={errors.position}
          />
          <Disclosure title="Tap it on the present outline">
            <PlaceCanvas
              lake={lake}
              label={point.label || name}
              place={readPosition(point.position)}
              onPlace={(place) => onChange({ ...point, position: positionText(place) })}
            />
          </Disclosure>
        </>
      ) : null}
      <Disclosure title="Its pixel as figures">
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          <PixelField
            label={`${name}: across, px`}
            value={point.xPx}
            onChange={(xPx) => onChange({ ...point, xPx })}
          />
          <PixelField
            label={`${name}: down, px`}
            value={point.yPx}
            onChange={(yPx) => onChange({ ...point, yPx })}
          />
        </View>
      </Disclosure>
      <View style={{ alignItems: 'flex-start' }}>
        <Button label={`Take ${name.toLowerCase()} out`} onPress={onRemove} />
      </View>
    </View>
  );
}

type PixelProps = { label: string; value: number; onChange: (value: number) => void };

function PixelField({ label, value, onChange }: PixelProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const leave = (): void => {
    const read = Number(typed);
    if (typed !== null && typed.trim() !== '' && read >= 0) onChange(read);
    setTyped(null);
  };
  return (
    <View style={{ flexGrow: 1, flexBasis: 130 }}>
      <Field
        label={label}
        keypad="decimal"
        value={typed ?? String(Math.round(value * 10) / 10)}
        onChange={setTyped}
        onBlur={leave}
      />
    </View>
  );
}

type FitProps = { fitting: Fitting | null; enough: boolean; size: { widthPx: number; heightPx: number } };

/** How well the points fit: the misses, the worst of them, and what to be careful of. */
export function FitFound({ fitting, enough, size }: FitProps) {
  const units = useUnits();
  if (!fitting)
    return enough ? (
      <Note kind="danger" title="These points don’t say how the picture lies" live>
        They lie too close together, or too near one line, or two of them are swapped. Choose points all round
        the water.
      </Note>
    ) : (
      <Text tone="inkSoft">
        Tap a place on the picture that you know, then say what it is: a peg, a mark, a corner whose
        coordinates you have. Two such points at least; three or more check each other.
      </Text>
    );
  const { fit, points } = fitting;
  const worst = worstPoint(fit);
  return (
    <View style={{ gap: space.small }}>
      <Facts
        facts={[
          { term: 'Missed by (RMS)', fact: length(fit.rmsM, units, 2) },
          {
            term: 'Worst',
            fact:
              fit.sigmaM === null
                ? null
                : `${points[worst]?.label ?? ''}: ${length(fit.residualsM[worst] ?? 0, units, 2)}`,
          },
          {
            term: 'A traced point',
            fact:
              fit.sigmaM === null
                ? 'not known: nothing checks it'
                : `σ ${length(fit.sigmaM, units, 2)} each way`,
          },
          { term: 'One pixel', fact: `${figure(metresPerPixel(fit.transform), 3)} m` },
        ]}
      />
      {pictureCautions(fit, points, size).map((caution) => {
        const { title, words } = cautionWords(caution, units);
        return (
          <Note key={caution.kind} kind="caution" title={title}>
            {words}
          </Note>
        );
      })}
    </View>
  );
}
