import { Problem } from '@mereward/shared/problems/problem';
import { expect, test } from 'vitest';
import { fieldErrors, pointerPath } from './field-errors';

test('a JSON pointer becomes the form’s own path', () => {
  expect(pointerPath('/details/name')).toBe('details.name');
  expect(pointerPath('/a~1b/0/c~0d')).toBe('a/b.0.c~d');
  expect(pointerPath('')).toBe('');
});

test('errors land on fields the form has, and only there', () => {
  const problem = new Problem('invalid', 'Not right yet', {
    errors: [
      { pointer: '/name', detail: 'Give a name' },
      { pointer: '/marks/1/label', detail: 'Too long' },
      { pointer: '/version', detail: 'Stale' },
      { pointer: '', detail: 'All of it' },
    ],
  });
  const values = { name: '', marks: [{ label: 'a' }, { label: 'b' }] };
  expect(fieldErrors(problem, values)).toEqual([
    { name: 'name', message: 'Give a name' },
    { name: 'marks.1.label', message: 'Too long' },
  ]);
});
