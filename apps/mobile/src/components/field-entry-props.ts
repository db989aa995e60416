export type Keypad = 'text' | 'decimal' | 'numeric' | 'email' | 'tel' | 'search' | 'url';

export type FieldEntryProps = {
  id: string;
  value: string;
  onChange: (value: string) => void;
  onBlur?: (() => void) | undefined;
  keypad?: Keypad | undefined;
  /** The browser's autocomplete token, such as `email` or `current-password`. */
  autoComplete?: string | undefined;
  secret?: boolean | undefined;
  lines?: number | undefined;
  placeholder?: string | undefined;
  invalid: boolean;
  /** Ids of what describes it: hint and error. */
  describedBy?: string | undefined;
  readOnly?: boolean | undefined;
  bank?: boolean | undefined;
  /** `date`, `time` and `datetime-local` use the browser's own pickers. */
  picker?: 'date' | 'time' | 'datetime-local' | undefined;
};
