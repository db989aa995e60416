import type { Control } from 'react-hook-form';
import { FormChoice } from '@/components/form-controls';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { MEASURE_PX } from '@/constants/layout';
import { AUDIENCES, LAYERS, type TypedLake } from '@/features/lakes/lake-fields';

/** Who may see each layer of the lake's charts, every audience explained. */
export function AudienceFields({ control }: { control: Control<{ details: TypedLake }> }) {
  return (
    <Section
      title="Who may see what"
      note="For each layer of a chart. Access, hazards and emergency words are always open to everybody."
    >
      {LAYERS.map(({ name, label, hint }) => (
        <FormChoice
          key={name}
          control={control}
          name={`details.audiences.${name}`}
          label={label}
          hint={hint}
          choices={AUDIENCES}
          columns={2}
          bank={false}
        />
      ))}
      <Text size="small" tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
        Members and staff see what is open to a ticket. Whoever may not see a layer is told so, and why.
      </Text>
    </Section>
  );
}
