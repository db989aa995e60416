import type { Rule } from '@mereward/shared/rules/contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { ruleNote } from '@/features/rules/rule-words';

const useStyles = themed((c) => ({
  rule: {
    flexDirection: 'row',
    gap: space.medium,
    paddingVertical: space.medium,
    borderBottomWidth: 1,
    borderBottomColor: c.rule,
    maxWidth: MEASURE_PX + 60,
  },
  number: { width: 36, textAlign: 'right' },
}));

/** Numbered rules as they are printed: number, text, why, and what breaking it may lead to. */
export function RuleList({ rules }: { rules: readonly Rule[] }) {
  const styles = useStyles();
  return (
    <View role="list" aria-label="Rules">
      {rules.map((rule) => (
        <View key={rule.id} role="listitem" style={styles.rule}>
          <Text weight="semibold" style={styles.number}>
            {rule.number}
          </Text>
          <View style={{ flex: 1, gap: space.hair }}>
            <Text>{rule.text}</Text>
            {rule.reason ? (
              <Text size="small" tone="inkSoft">
                Why: {rule.reason}
              </Text>
            ) : null}
            <Text size="small" tone="inkSoft">
              {ruleNote(rule)}
            </Text>
          </View>
        </View>
      ))}
    </View>
  );
}
