import { useState } from 'react';
import { useController } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { FormChoice } from '@/components/form-controls';
import { CastPart, FoldedPart } from '@/features/surveys/cast-part';
import { BACK_CELLS, backWords, DRAG_CELLS, DROP_CELLS } from '@/features/surveys/feel-words';
import type { CastFormState } from '@/features/surveys/use-cast-form';

/** How it landed, how it drags, what came back. Nothing chosen is nothing known: it is not a vote. */
export function FeelPart({ form }: { form: CastFormState }) {
  const back = useController({ control: form.control, name: 'cameBack' });
  const [looking, setLooking] = useState(false);
  return (
    <>
      <CastPart>
        <FormChoice
          control={form.control}
          name="drop"
          label="How it landed"
          choices={DROP_CELLS}
          columns={4}
        />
      </CastPart>
      <CastPart>
        <FormChoice
          control={form.control}
          name="drag"
          label="How it drags"
          choices={DRAG_CELLS}
          columns={4}
        />
      </CastPart>
      <FoldedPart
        label="What came back"
        words={backWords(back.field.value)}
        act={looking ? 'close' : 'choose'}
        open={looking}
        onTurn={() => setLooking(!looking)}
      >
        <ManyChoiceGrid
          label="Came back on the lead or the hook"
          choices={BACK_CELLS}
          values={back.field.value}
          onChange={back.field.onChange}
          columns={3}
        />
      </FoldedPart>
    </>
  );
}
