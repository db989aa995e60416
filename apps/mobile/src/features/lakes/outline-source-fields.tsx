import { OUTLINE_WAYS, OutlineSource } from '@mereward/shared/lakes/outline-source';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { Field } from '@/components/field';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { typedNumber } from '@/lib/typed-schemas';

const WAYS = OutlineSource.shape.way.options;
const NOT_SAID = 'not_said';
const CHOICES: readonly Choice<OutlineSource['way'] | typeof NOT_SAID>[] = [
  { key: NOT_SAID, label: 'Nobody knows' },
  ...WAYS.map((key) => ({ key, label: OUTLINE_WAYS[key] })),
];

const Within = typedNumber({ what: 'How far off it may be', min: 0.1, max: 50, unit: 'm' });

/** How an outline was found, as it is typed. */
export const TypedOutlineSource = z
  .object({ way: z.enum([NOT_SAID, ...WAYS]), within: z.string() })
  .transform(({ way, within }, context): OutlineSource | null => {
    if (way === NOT_SAID) return null;
    const read = Within.safeParse(within);
    if (read.success) return { way, withinM: read.data };
    for (const { message } of read.error.issues)
      context.addIssue({ code: 'custom', path: ['within'], message });
    return z.NEVER;
  });
export type TypedOutlineSource = z.input<typeof TypedOutlineSource>;

export const typedOutlineSource = (source: OutlineSource | undefined): TypedOutlineSource =>
  source ? { way: source.way, within: String(source.withinM) } : { way: NOT_SAID, within: '' };

/** What of it goes into a lake's details. */
export const outlineFrom = (source: OutlineSource | null): { outlineFrom?: OutlineSource } =>
  source ? { outlineFrom: source } : {};

type Props<V extends FieldValues, Out> = { control: Control<V, unknown, Out>; name: FieldPath<V> };

/** How sure the line is: the water's edge counts as depth nought, and no surer than its line. */
export function OutlineSourceFields<V extends FieldValues, Out>({ control, name }: Props<V, Out>) {
  const { field, fieldState } = useController({ control, name });
  const value: TypedOutlineSource = field.value;
  const fault = z.object({ within: z.object({ message: z.string() }) }).safeParse(fieldState.error);
  return (
    <Section title="How the outline was found" bare>
      <Select
        label="Found by"
        choices={CHOICES}
        value={value.way}
        onChange={(way) => field.onChange({ ...value, way })}
      />
      {value.way === NOT_SAID ? null : (
        <Field
          label="It lies within, m"
          hint="In 19 of 20 places. A phone under open sky: about 5 m; a traced picture: what its known points are missed by, or more."
          keypad="decimal"
          value={value.within}
          onChange={(within) => field.onChange({ ...value, within })}
          error={fault.success ? fault.data.within.message : undefined}
        />
      )}
    </Section>
  );
}
