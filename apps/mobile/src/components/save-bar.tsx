import { Button } from '@/components/button';

type Props = {
  form: { submit: () => void; busy: boolean };
  /** The act in its own words: "Keep the reading". */
  act: string;
  /** What is said meanwhile, such as "Keeping…". */
  busyLabel: string;
};

/** The one main act of a form on the bank, for a page's foot: within reach of the thumb, for wet hands. */
export function SaveBar({ form, act, busyLabel }: Props) {
  return (
    <Button label={act} kind="main" bank grow busy={form.busy} busyLabel={busyLabel} onPress={form.submit} />
  );
}
