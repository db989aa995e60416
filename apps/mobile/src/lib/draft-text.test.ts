import { expect, test } from 'vitest';
import { draftKey, readDraft, writeDraft } from './draft-text';

const start = { name: '', pegs: [] as string[], depthM: null, open: true };

test('a draft holds only what differs from the start, and comes back as it was', () => {
  const text = writeDraft({ ...start, name: 'Far', depthM: 2.5 }, start, []);
  expect(text).toBe('{"name":"Far","depthM":2.5}');
  expect(readDraft(text, start)).toEqual({ name: 'Far', depthM: 2.5 });
});

test('nothing typed is no draft', () => {
  expect(writeDraft(start, start, [])).toBeNull();
});

test('a password is never kept', () => {
  const form = { email: '', password: '' };
  expect(writeDraft({ email: 'a@b.c', password: 'long and secret' }, form, ['password'])).toBe(
    '{"email":"a@b.c"}',
  );
});

test('a field that changed its sort of value, or is gone, is left out', () => {
  expect(readDraft('{"name":4,"pegs":{},"open":false,"gone":1}', start)).toEqual({ open: false });
});

test('what is no draft at all is nothing', () => {
  for (const text of [null, '', '{', '4', 'null', '{}', '"x"']) expect(readDraft(text, start)).toBeNull();
});

test('two people at one device have two drafts', () => {
  expect(draftKey('one', 'lake')).not.toBe(draftKey('two', 'lake'));
  expect(draftKey(null, 'lake')).toBe('mereward.draft.stranger.lake');
});
