import type { ReactNode } from 'react';
import { space } from '@/constants/layout';

type Props = { label: string; onSubmit: () => void; children: ReactNode };

/** A form: on the web Enter in any field submits it, as everywhere. `label` names it to a screen reader. */
export function Form({ label, onSubmit, children }: Props) {
  return (
    <form
      aria-label={label}
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        event.stopPropagation();
        onSubmit();
      }}
      style={{ display: 'flex', flexDirection: 'column', gap: space.page, margin: 0 }}
    >
      {children}
      {/* The visible buttons are plain buttons; this unseen one is what lets Enter submit. */}
      <button type="submit" hidden />
    </form>
  );
}
