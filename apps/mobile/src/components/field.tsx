import { useId } from 'react';
import { FieldEntry } from '@/components/field-entry';
import type { FieldEntryProps } from '@/components/field-entry-props';
import { describedBy, FieldFrame } from '@/components/field-frame';

type Props = Omit<FieldEntryProps, 'id' | 'invalid' | 'describedBy'> & {
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  optional?: boolean | undefined;
};

/**
 * One thing to type: label above, hint under the label, error under the box.
 * `keypad="decimal"` for measures, `"numeric"` for counts, `picker="date"` for days, `lines` for long text.
 */
export function Field({ label, hint, error, optional, ...entry }: Props) {
  const id = useId();
  return (
    <FieldFrame id={id} label={label} hint={hint} error={error} optional={optional}>
      <FieldEntry
        {...entry}
        id={id}
        invalid={error !== undefined}
        describedBy={describedBy({ id, hint, error })}
      />
    </FieldFrame>
  );
}
