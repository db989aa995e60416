import { NowhereKept } from '@/lib/nowhere-kept';
import { Problem, type ProblemKind } from '@mereward/shared/problems/problem';

export type ProblemWords = { title: string; whatToDo: string };

/** What to do about each kind of refusal, where the server did not say. */
function adviceFor(kind: ProblemKind): string {
  switch (kind) {
    case 'invalid':
      return 'Look at what is marked, put it right and try again. What you typed is still here.';
    case 'not-signed-in':
      return 'Sign in again to go on. What you typed is kept on this device.';
    case 'forbidden':
      return 'Your role here does not allow it. Ask the fishery’s owner or manager.';
    case 'not-found':
      return 'It may have been moved or taken away, or it is not open to you. Go back and look again.';
    case 'conflict':
      return 'Somebody else changed it first. Read it afresh, then decide.';
    case 'too-large':
      return 'Send something smaller.';
    case 'too-many':
      return 'Wait a few minutes, then try again.';
    case 'internal':
      return 'The fault is ours and is on record. Try again; what you typed is still here.';
  }
}

/** Words for anything that went wrong. Without a signal there is no `Problem`, only a fetch that failed (a TypeError). */
export function problemWords(fault: unknown): ProblemWords {
  if (fault instanceof Problem)
    return { title: fault.title, whatToDo: fault.detail ?? adviceFor(fault.kind) };
  if (fault instanceof TypeError)
    return {
      title: 'No answer from the server',
      whatToDo:
        'There may be no signal here. What you typed is kept on this device; try again when there is.',
    };
  if (fault instanceof NowhereKept)
    return {
      title: 'Not kept: this phone has no room, and there is no signal',
      whatToDo:
        'It stands in this form only. Leave the page open, make room on the phone or find a signal, then keep it again. Note it on paper if you must go on.',
    };
  return { title: 'Something in this page failed', whatToDo: adviceFor('internal') };
}
