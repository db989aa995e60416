import { DraftAnswer, RulesView } from '@mereward/shared/rules/sheet-contract';
import type { ChangeWeight, Rule } from '@mereward/shared/rules/contract';
import { randomUUID } from 'node:crypto';
import type { TestFishery } from './waters';

export const aRule = (number: number, text: string, wishes: Partial<Rule> = {}): Rule => ({
  id: randomUUID(),
  number,
  text,
  reason: '',
  category: 'conduct',
  scope: { lakeIds: null, pegIds: null, ticketTypeIds: null },
  basis: 'fishery',
  link: '',
  severity: 'warn',
  ...wishes,
});

/** Publishes these rules as the fishery's next version: drafted by the office, put in force by the manager. */
export async function publishRules(
  { id, people }: TestFishery,
  rules: readonly Rule[],
  weight: ChangeWeight,
): Promise<RulesView> {
  const drafted = await people.office
    .put(`/fisheries/${id}/rules/draft`)
    .send({ id: randomUUID(), sheet: { rules }, version: null });
  if (drafted.status !== 200) throw new Error(`The draft was answered ${drafted.status}: ${drafted.text}`);
  const { draft } = DraftAnswer.parse(drafted.body);
  const answer = await people.manager
    .post(`/fisheries/${id}/rules/publish`)
    .send({ draftId: draft?.id, version: draft?.version, weight });
  if (answer.status !== 200) throw new Error(`Publishing was answered ${answer.status}: ${answer.text}`);
  return RulesView.parse(answer.body);
}
