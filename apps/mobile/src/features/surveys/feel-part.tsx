import { CameBack, Drag, Drop } from '@mereward/shared/surveys/contract';
import { CAME_BACK_WORDS, DRAG_WORDS, DROP_WORDS } from '@mereward/shared/surveys/cast-words';
import { useController } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import type { CastFormState } from '@/features/surveys/use-cast-form';

const DROPS = Drop.options.map((key) => ({ key, label: DROP_WORDS[key] }));
const DRAGS = Drag.options.map((key) => ({ key, label: DRAG_WORDS[key] }));
const BACK = CameBack.options.map((key) => ({ key, label: CAME_BACK_WORDS[key] }));

/** How it landed, how it drags, what came back. Nothing chosen is nothing known: it is not a vote. */
export function FeelPart({ form }: { form: CastFormState }) {
  const back = useController({ control: form.control, name: 'cameBack' });
  return (
    <>
      <FormChoice control={form.control} name="drop" label="How it landed" choices={DROPS} columns={3} />
      <FormChoice control={form.control} name="drag" label="How it drags" choices={DRAGS} columns={3} />
      <FormField
        control={form.control}
        name="dragLengthM"
        label="Dragged for"
        hint="Metres of line drawn back while it felt so"
        keypad="decimal"
        optional
        bank
      />
      <ManyChoiceGrid
        label="What came back"
        hint="Leave empty when nobody looked"
        choices={BACK}
        values={back.field.value}
        onChange={back.field.onChange}
        columns={3}
      />
    </>
  );
}
