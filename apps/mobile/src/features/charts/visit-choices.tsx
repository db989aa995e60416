import type { VisitView } from '@mereward/shared/surveys/contract';
import { useController, type Control } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { visitCountWords } from '@/features/surveys/visit-words';
import { dayName } from '@/lib/format-time';

type Wanted = { title: string; contourStep: string; visitIds: string[] };

/** The lake's visits, each with who, when and how many casts. */
export function Choices({ control, visits }: { control: Control<Wanted>; visits: readonly VisitView[] }) {
  const { field, fieldState } = useController({ control, name: 'visitIds' });
  return (
    <ManyChoiceGrid
      label="Made from these visits"
      choices={visits.map((visit) => ({
        key: visit.id,
        label: visit.title,
        note: `${dayName(visit.startedAt.slice(0, 10))}, ${visit.surveyor.name}, ${visitCountWords(visit)}${visit.status === 'open' ? ', still open' : ''}`,
      }))}
      values={field.value}
      onChange={field.onChange}
      columns={1}
      bank={false}
      error={fieldState.error?.message}
    />
  );
}
