import { Rule, RuleCategory } from '@mereward/shared/rules/contract';
import { useController } from 'react-hook-form';
import { Button } from '@/components/button';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormChoice, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { BASIS_WORDS, CATEGORY_WORDS, SEVERITY_WORDS } from '@/features/rules/rule-words';
import { ruleOfTyped, RuleTyped, typedRule } from '@/features/rules/sheet-draft';
import { useDraftForm } from '@/hooks/use-draft-form';

type Props = {
  rule: Rule;
  version: number | null;
  lakes: readonly { id: string; name: string }[];
  onKeep: (rule: Rule) => Promise<unknown>;
  onClose: () => void;
};

/** One rule of the draft: its words, why, and what breaking it may lead to. */
export function RuleForm({ rule, version, lakes, onKeep, onClose }: Props) {
  const form = useDraftForm({
    form: `rule:${rule.id}:${String(version)}`,
    schema: RuleTyped,
    start: typedRule(rule),
    send: (typed) => onKeep(ruleOfTyped(typed)),
    onDone: onClose,
  });
  const chosen = useController({ control: form.control, name: 'lakeIds' });
  return (
    <DraftFormFrame
      form={form}
      label={`Rule ${String(rule.number)}`}
      act="Keep the rule"
      busyLabel="Keeping…"
      beside={<Button label="Leave it" kind="quiet" onPress={onClose} />}
    >
      <FormField control={form.control} name="number" label="Number" keypad="numeric" />
      <FormField control={form.control} name="text" label="The rule" lines={4} />
      <FormField control={form.control} name="reason" label="Why" lines={2} optional />
      <FormSelect
        control={form.control}
        name="category"
        label="About"
        choices={RuleCategory.options.map((key) => ({ key, label: CATEGORY_WORDS[key] }))}
      />
      <FormChoice
        control={form.control}
        name="severity"
        label="Breaking it may lead to"
        choices={Rule.shape.severity.options.map((key) => ({ key, label: SEVERITY_WORDS[key] }))}
        columns={3}
        bank={false}
      />
      <FormChoice
        control={form.control}
        name="basis"
        label="Where it comes from"
        hint="Give a byelaw’s own page as the link, with the day you read it in the reason."
        choices={Rule.shape.basis.options.map((key) => ({ key, label: BASIS_WORDS[key] }))}
        columns={3}
        bank={false}
      />
      <FormField control={form.control} name="link" label="Link" keypad="url" optional />
      <ManyChoiceGrid
        label="Where it holds"
        hint="None chosen: on every lake."
        choices={lakes.map(({ id: key, name: label }) => ({ key, label }))}
        values={chosen.field.value}
        onChange={chosen.field.onChange}
        columns={1}
        bank={false}
      />
    </DraftFormFrame>
  );
}
