import type { LogPreview } from '@mereward/shared/surveys/log-contract';
import { Children, type ReactNode } from 'react';
import { useWatch, type Control } from 'react-hook-form';
import { View } from 'react-native';
import { FormChoice, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { space } from '@/constants/layout';
import type { LogRead, LogTyped } from '@/features/surveys/log-draft';

type Props = { control: Control<LogTyped, unknown, LogRead>; preview: LogPreview };

const UNITS = [
  { key: 'm', label: 'metres' },
  { key: 'ft', label: 'feet' },
  { key: 'fathom', label: 'fathoms' },
] as const;
const MARKS = [
  { key: 'point', label: 'before decimals stands a point: 1.5' },
  { key: 'comma', label: 'before decimals stands a comma: 1,5' },
] as const;
const MEANINGS = [
  { key: 'depth', label: 'the depth below the surface' },
  { key: 'bed_height', label: 'the height of the bed' },
] as const;
const LEVELS = [
  { key: 'by_hour', label: 'the board’s, at the hour of each depth' },
  { key: 'at_start', label: 'the board’s at the visit’s start, for all' },
] as const;
const COLUMN_LABELS = { lat: 'Latitude', lon: 'Longitude', depth: 'Depth', time: 'Time' } as const;

/** How a log is read, with units and usual values; what its kind of file doesn't need is not asked. */
export function LogOptionsPart({ control, preview }: Props) {
  const { format } = preview;
  return (
    <>
      {format === 'csv' ? <TableOptions control={control} preview={preview} /> : null}
      {format === 'gpx' || format === 'geojson' ? <DepthOptions control={control} preview={preview} /> : null}
      <FormField
        control={control}
        name="transducer"
        label="Transducer below the surface, m"
        hint={
          format === 'nmea'
            ? 'Added to depths that count from the transducer. Where the log states it itself, that is taken.'
            : 'Added to every depth. Nought if the depths count from the surface.'
        }
        keypad="decimal"
        bank
      />
      <FormPart
        control={control}
        title="How sure it is, and what is left out"
        names={['depthSigma', 'depthShare', 'positionSigma', 'gap', 'outside']}
      >
        <SideBySide>
          <FormField
            control={control}
            name="positionSigma"
            label="Error of a place, ± m"
            hint="One standard deviation. About 3 m for plain satellite fixes, 1.5 m for corrected ones."
            keypad="decimal"
            bank
          />
          <FormField
            control={control}
            name="depthSigma"
            label="Error of a depth, ± m"
            hint="One standard deviation of a single echo."
            keypad="decimal"
            bank
          />
          <FormField
            control={control}
            name="depthShare"
            label="and of the depth, ± %"
            hint="What the speed of sound leaves unsure."
            keypad="decimal"
            bank
          />
          {format === 'nmea' ? (
            <FormField
              control={control}
              name="gap"
              label="Longest gap between fixes, s"
              hint="A depth between two fixes further apart has no place."
              keypad="decimal"
              bank
            />
          ) : null}
          <FormField
            control={control}
            name="outside"
            label="Outside the outline by, m"
            hint="Places further off the water than this are left out."
            keypad="decimal"
            bank
          />
        </SideBySide>
        <FormChoice
          control={control}
          name="level"
          label="Depths are brought to datum by"
          choices={LEVELS}
          columns={1}
        />
      </FormPart>
    </>
  );
}

function TableOptions({ control, preview }: Props) {
  const choices = preview.heading.map((heading, at) => ({
    key: String(at),
    label: heading === '' ? `column ${at + 1}` : heading,
  }));
  return (
    <>
      <SideBySide>
        {(['lat', 'lon', 'depth', 'time'] as const).map((name) => (
          <FormSelect
            key={name}
            control={control}
            name={name}
            label={COLUMN_LABELS[name]}
            choices={name === 'time' ? [{ key: '', label: 'not in the file' }, ...choices] : choices}
            unset="Choose a column"
            bank
          />
        ))}
      </SideBySide>
      <FormChoice control={control} name="depthUnit" label="Depths are in" choices={UNITS} columns={3} />
      <FormChoice control={control} name="decimal" label="In depths" choices={MARKS} columns={1} />
    </>
  );
}

function DepthOptions({ control, preview }: Props) {
  const means = useWatch({ control, name: 'depthMeans' });
  const choices = preview.depthChoices.map(({ key, words, count }) => ({
    key,
    label: `${words}, in ${count} points`,
  }));
  return (
    <>
      <FormSelect
        control={control}
        name="depthFrom"
        label="The depth is"
        choices={choices}
        unset="Choose a number"
        bank
      />
      <FormChoice control={control} name="depthMeans" label="That number is" choices={MEANINGS} columns={1} />
      {means === 'bed_height' ? (
        <FormField
          control={control}
          name="waterHeight"
          label="Height of the surface, m"
          hint="In the same heights. The depth is this less the bed’s."
          keypad="decimal"
          bank
        />
      ) : null}
      <FormChoice control={control} name="depthUnit" label="It is in" choices={UNITS} columns={3} />
    </>
  );
}

const SideBySide = ({ children }: { children: ReactNode }) => (
  <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
    {Children.map(children, (child) =>
      child ? <View style={{ flexGrow: 1, flexBasis: 230, maxWidth: 490 }}>{child}</View> : null,
    )}
  </View>
);
