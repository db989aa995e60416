import { randomUUID } from 'node:crypto';
import type { Person } from './people';
import type { TestServer } from './server';

type Drafting = { person: Person; lakeId: string; visitIds: string[]; settle?: boolean };

/** A draft of some visits, built unless asked not to settle. */
export async function draftedChart(
  test: TestServer,
  { person, lakeId, visitIds, settle = true }: Drafting,
): Promise<string> {
  const id = randomUUID();
  const body = { id, title: 'Spring survey', visitIds, contourStepM: 0.5 };
  const answer = await person.post(`/lakes/${lakeId}/charts`).send(body);
  if (answer.status !== 202) throw new Error(`The draft was not made: ${answer.text}`);
  if (settle) await test.settle();
  return id;
}

/** A chart drafted, built, submitted and approved by another. */
export async function publishedChart(
  test: TestServer,
  wishes: Drafting & { approver: Person },
): Promise<string> {
  const id = await draftedChart(test, wishes);
  const submitted = await wishes.person.post(`/charts/${id}/submit`);
  if (submitted.status !== 200) throw new Error(`The chart was not submitted: ${submitted.text}`);
  const approved = await wishes.approver.post(`/charts/${id}/approve`);
  if (approved.status !== 200) throw new Error(`The chart was not approved: ${approved.text}`);
  return id;
}
