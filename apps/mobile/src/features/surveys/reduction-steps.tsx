import type { ReductionStep } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  step: { gap: space.hair, paddingVertical: space.medium, borderBottomWidth: 1, borderBottomColor: c.rule },
  head: { flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'space-between', columnGap: space.medium },
}));

/** Every step of a reduction: what was worked out, by which formula, from what. */
export function ReductionSteps({ steps }: { steps: readonly ReductionStep[] }) {
  return (
    <View role="list" aria-label="Steps">
      {steps.map((step) => (
        <Step key={step.key} step={step} />
      ))}
    </View>
  );
}

function Step({ step }: { step: ReductionStep }) {
  const styles = useStyles();
  return (
    <View role="listitem" style={styles.step}>
      <View style={styles.head}>
        <Text weight="semibold" style={{ flexShrink: 1 }}>
          {step.name}
        </Text>
        <Text weight="semibold">{step.sigma === null ? step.value : `${step.value} ${step.sigma}`}</Text>
      </View>
      <Text size="small">{step.formula}</Text>
      {step.inputs.length > 0 ? (
        <Text size="small" tone="inkSoft">
          {step.inputs.map(({ name, value }) => `${name} ${value}`).join(' · ')}
        </Text>
      ) : null}
    </View>
  );
}
