import type { Problem } from '@mereward/shared/problems/problem';
import type { FieldPath, FieldValues } from 'react-hook-form';

type FieldError<V extends FieldValues> = { name: FieldPath<V>; message: string };

/** JSON pointer steps (RFC 6901) as a form's own path: `/gauge~1board/0/name` is `gauge/board.0.name`. */
export const pointerPath = (pointer: string): string =>
  pointer
    .split('/')
    .slice(1)
    .map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'))
    .join('.');

function has(values: unknown, path: string): boolean {
  let at: unknown = values;
  for (const step of path.split('.')) {
    if (typeof at !== 'object' || at === null || !(step in at)) return false;
    at = Object.entries(at).find(([name]) => name === step)?.[1];
  }
  return true;
}

/** The errors of a refusal that point at a field the form has. The rest are told beside the form. */
export function fieldErrors<V extends FieldValues>(problem: Problem, values: V): FieldError<V>[] {
  const isField = (path: string): path is FieldPath<V> => path !== '' && has(values, path);
  return problem.errors.flatMap(({ pointer, detail }) => {
    const name = pointerPath(pointer);
    return isField(name) ? [{ name, message: detail }] : [];
  });
}
