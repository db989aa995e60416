import { Problem, ProblemBody, PROBLEM_STATUS, type ProblemKind } from '@mereward/shared/problems/problem';

function kindOf(status: number): ProblemKind {
  const known = Object.entries(PROBLEM_STATUS).find(([, of]) => of === status)?.[0];
  return ProblemBody.shape.kind.safeParse(known).data ?? 'internal';
}

/** Rebuilds the `Problem` a refused request was answered with, whatever stood between us and the server. */
export async function problemOf(response: Response): Promise<Problem> {
  const body: unknown = await response.json().catch(() => undefined);
  const parsed = ProblemBody.safeParse(body);
  if (!parsed.success)
    return new Problem(kindOf(response.status), `The server answered ${String(response.status)}`, {});
  const { kind, title, detail, errors, instance } = parsed.data;
  return new Problem(kind, title, {
    ...(detail === undefined ? {} : { detail }),
    ...(errors === undefined ? {} : { errors }),
    ...(instance === undefined ? {} : { instance }),
  });
}
