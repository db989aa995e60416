import type { RuleChangeView } from '@mereward/shared/rules/sheet-contract';
import { View } from 'react-native';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { SEVERITY_WORDS } from '@/features/rules/rule-words';

const useStyles = themed((c) => ({
  change: {
    gap: space.small,
    paddingVertical: space.medium,
    borderBottomWidth: 1,
    borderBottomColor: c.rule,
    maxWidth: MEASURE_PX + 60,
  },
  before: { borderLeftWidth: 3, borderLeftColor: c.rule, paddingLeft: space.medium },
  after: { borderLeftWidth: 3, borderLeftColor: c.water, paddingLeft: space.medium },
  gone: { textDecorationLine: 'line-through' },
  fresh: { textDecorationLine: 'underline' },
}));

/** What changed between two versions, each rule with its words before and after. */
export function RuleChangesList({ changes }: { changes: readonly RuleChangeView[] }) {
  return (
    <View role="list" aria-label="What changed">
      {changes.map((change) => (
        <ChangeOf key={change.kind === 'changed' ? change.after.id : change.rule.id} change={change} />
      ))}
    </View>
  );
}

const LOOKS = {
  added: { shape: 'triangle', tone: 'reed', word: 'new' },
  removed: { shape: 'cross', tone: 'inkSoft', word: 'taken away' },
  changed: { shape: 'diamond', tone: 'amber', word: 'changed' },
} as const;

function ChangeOf({ change }: { change: RuleChangeView }) {
  const styles = useStyles();
  const rule = change.kind === 'changed' ? change.after : change.rule;
  return (
    <View role="listitem" style={styles.change}>
      <View style={{ flexDirection: 'row', gap: space.medium, alignItems: 'center' }}>
        <Text weight="semibold">Rule {rule.number}</Text>
        <StatusShape {...LOOKS[change.kind]} size="small" />
      </View>
      {change.kind === 'changed' ? <BeforeAfter change={change} /> : <Text>{rule.text}</Text>}
    </View>
  );
}

type Changed = Extract<RuleChangeView, { kind: 'changed' }>;

function BeforeAfter({ change }: { change: Changed }) {
  const styles = useStyles();
  const { before, after, words, fields } = change;
  return (
    <>
      {fields.includes('text') ? (
        <>
          <View style={styles.before}>
            <Text size="small" tone="inkSoft">
              Before
            </Text>
            <Text tone="inkSoft">
              {words
                .filter(({ kind }) => kind !== 'new')
                .map(({ kind, text }, i) => (
                  <Text key={String(i)} tone="inkSoft" {...(kind === 'gone' ? { style: styles.gone } : {})}>
                    {text}
                  </Text>
                ))}
            </Text>
          </View>
          <View style={styles.after}>
            <Text size="small" tone="inkSoft">
              Now
            </Text>
            <Text>
              {words
                .filter(({ kind }) => kind !== 'gone')
                .map(({ kind, text }, i) => (
                  <Text
                    key={String(i)}
                    weight={kind === 'new' ? 'semibold' : 'regular'}
                    {...(kind === 'new' ? { style: styles.fresh } : {})}
                  >
                    {text}
                  </Text>
                ))}
            </Text>
          </View>
        </>
      ) : (
        <Text>{after.text}</Text>
      )}
      {fields.includes('severity') ? (
        <Text size="small" tone="inkSoft">
          Breaking it: {SEVERITY_WORDS[before.severity].toLowerCase()} before,{' '}
          {SEVERITY_WORDS[after.severity].toLowerCase()} now.
        </Text>
      ) : null}
      {fields.includes('number') ? (
        <Text size="small" tone="inkSoft">
          It was rule {before.number}.
        </Text>
      ) : null}
      {fields.includes('scope') ? (
        <Text size="small" tone="inkSoft">
          It holds for other waters, pegs or tickets than before.
        </Text>
      ) : null}
    </>
  );
}
