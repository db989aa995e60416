import { useState } from 'react';
import type { Rule } from '@mereward/shared/rules/contract';
import type { DraftAnswer } from '@mereward/shared/rules/sheet-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { putRuleDraft, useDropDraft, useRuleDraft } from '@/features/rules/api';
import { PublishPart } from '@/features/rules/publish-part';
import { RuleChangesList } from '@/features/rules/rule-changes-list';
import { RuleForm } from '@/features/rules/rule-form';
import { RuleList } from '@/features/rules/rule-list';
import { RULE_TEMPLATES } from '@/features/rules/rule-templates';
import { ruleNote, versionWords } from '@/features/rules/rule-words';
import { freshRule, withRule } from '@/features/rules/sheet-draft';
import { newId } from '@/lib/new-id';

/** The rules from the office: what is in force, the draft, publishing it. */
export function OfficeRulesScreen() {
  const fishery = useChosenFishery(OFFICE_ROLES);
  return (
    <Page title="Rules" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fishery}
        none={<Empty title="No fishery">The office and the manager write rules.</Empty>}
      >
        {(fisheryId) => <Rules fisheryId={fisheryId} lakes={fishery.chosen?.lakes ?? []} />}
      </ChosenFishery>
    </Page>
  );
}

type Ground = { fisheryId: string; lakes: readonly { id: string; name: string }[] };

function Rules({ fisheryId, lakes }: Ground) {
  const answer = useRuleDraft(fisheryId);
  return (
    <Loaded query={answer} waiting="Reading the rules…">
      {(value) => (
        <>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
            <LinkButton label="Who has read them" href={`/office/rules/readers?fisheryId=${fisheryId}`} />
            <LinkButton label="As visitors read them" href={`/water/rules/${fisheryId}`} />
            <LinkButton label="All versions" href={`/water/rules/versions/${fisheryId}`} />
          </View>
          {value.draft ? (
            <Draft fisheryId={fisheryId} lakes={lakes} answer={value} />
          ) : (
            <Begin fisheryId={fisheryId} answer={value} />
          )}
          <Section
            title={value.inForce ? `In force: ${versionWords(value.inForce).toLowerCase()}` : 'In force'}
          >
            {value.inForce ? (
              <RuleList rules={value.inForce.rules} />
            ) : (
              <Text tone="inkSoft">No rules were ever published: a ticket asks nobody to read any.</Text>
            )}
          </Section>
        </>
      )}
    </Loaded>
  );
}

function Begin({ fisheryId, answer: { inForce, may } }: { fisheryId: string; answer: DraftAnswer }) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<unknown>(null);
  if (!may.write)
    return <Text tone="inkSoft">Nobody has begun a draft. The office or a manager does that.</Text>;
  const begin = async (rules: Rule[]): Promise<void> => {
    setBusy(true);
    setProblem(null);
    try {
      await putRuleDraft(fisheryId, { id: newId(), sheet: { rules }, version: null });
    } catch (fault) {
      setProblem(fault);
    } finally {
      setBusy(false);
    }
  };
  const usual = RULE_TEMPLATES.map((template, i) => ({ ...freshRule([]), ...template, number: i + 1 }));
  return (
    <View style={{ gap: space.small, alignItems: 'flex-start' }}>
      <ProblemNote problem={problem} />
      {inForce ? (
        <Button
          label="Begin a change of the rules"
          kind="main"
          busy={busy}
          onPress={() => void begin(inForce.rules)}
        />
      ) : (
        <>
          <Text>Begin with rules many fisheries have, and word them your way. Nobody sees a draft.</Text>
          <Button label="Begin with usual rules" kind="main" busy={busy} onPress={() => void begin(usual)} />
          <Button label="Begin with none" disabled={busy} onPress={() => void begin([])} />
        </>
      )}
    </View>
  );
}

function Draft({ fisheryId, lakes, answer }: Ground & { answer: DraftAnswer }) {
  const [editing, setEditing] = useState<Rule | null>(null);
  const [dropping, setDropping] = useState(false);
  const [problem, setProblem] = useState<unknown>(null);
  const drop = useDropDraft(fisheryId);
  const { draft, may } = answer;
  if (!draft) return null;
  const put = (rules: Rule[]) =>
    putRuleDraft(fisheryId, { id: draft.id, sheet: { rules }, version: draft.version });
  const takeOut = async (rule: Rule): Promise<void> => {
    setProblem(null);
    try {
      await put(draft.rules.filter(({ id }) => id !== rule.id));
      setEditing(null);
    } catch (fault) {
      setProblem(fault);
    }
  };
  if (editing)
    return (
      <Section title={`Rule ${String(editing.number)}`} bare>
        <RuleForm
          rule={editing}
          version={draft.version}
          lakes={lakes}
          onKeep={(rule) => put(withRule(draft.rules, rule))}
          onClose={() => setEditing(null)}
        />
        <ProblemNote problem={problem} />
        {draft.rules.some(({ id }) => id === editing.id) ? (
          <View style={{ alignItems: 'flex-start' }}>
            <Button label="Take this rule out" kind="danger" onPress={() => void takeOut(editing)} />
          </View>
        ) : null}
      </Section>
    );
  return (
    <Section title="The draft" note="Nobody sees it until it is published." bare>
      <List label="Rules of the draft">
        {draft.rules.map((rule) => (
          <Row
            key={rule.id}
            title={`${String(rule.number)}. ${rule.text}`}
            note={ruleNote(rule)}
            {...(may.write ? { onPress: () => setEditing(rule) } : {})}
          />
        ))}
      </List>
      {may.write ? (
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          <Button label="Add a rule" onPress={() => setEditing(freshRule(draft.rules))} />
          <Button label="Throw the draft away" kind="quiet" onPress={() => setDropping(true)} />
        </View>
      ) : null}
      <ProblemNote problem={drop.error} />
      <Section title={draft.words}>
        <RuleChangesList changes={draft.changes} />
      </Section>
      {may.publish && draft.changes.length > 0 ? (
        <PublishPart key={draft.version} fisheryId={fisheryId} draft={draft} />
      ) : null}
      <Confirm
        open={dropping}
        title="Throw the draft away?"
        words="What was changed in it is gone. The rules in force stay."
        act="Throw it away"
        danger
        busy={drop.isPending}
        onClose={() => setDropping(false)}
        onAct={() => drop.mutate(undefined, { onSettled: () => setDropping(false) })}
      />
    </Section>
  );
}
