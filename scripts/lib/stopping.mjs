import { readFileSync } from 'node:fs';

const repeatAfterMs = 1_000;

/**
 * Listens for the ways a person or a machine asks a script to stop: Ctrl-C, a signal, a closed
 * terminal, and npm, which started it, being gone. A second Ctrl-C leaves at once; what was started
 * then ends by itself, because the pipes and channels that hold it close.
 */
export function whenAskedToStop() {
  let asked = false;
  let askedMs = 0;
  /** @type {(value: undefined) => void} */
  let tell = () => undefined;
  const answer = new Promise((resolve) => (tell = resolve));
  const ask = () => {
    // Ctrl-C reaches npm and this script, and npm passes its own on: what comes together is one wish.
    if (asked && performance.now() - askedMs < repeatAfterMs) return;
    if (asked) process.exit(130);
    asked = true;
    askedMs = performance.now();
    tell(undefined);
  };
  process.on('SIGINT', ask);
  process.on('SIGTERM', () => asked || ask());
  process.on('SIGHUP', () => asked || ask());
  if (process.env.npm_lifecycle_event) watchParent(() => asked || ask());
  return { asked: answer, isAsked: () => asked };
}

/** npm starts a shell that starts this script: either of them gone is npm gone. @param {() => void} gone */
function watchParent(gone) {
  const before = forebears();
  const timer = setInterval(() => {
    if (forebears() === before) return;
    clearInterval(timer);
    gone();
  }, 500);
  timer.unref();
}

/** The numbers of the process that started this one and of the one that started that. */
function forebears() {
  const parent = process.ppid;
  try {
    const [, afterName = ''] = readFileSync(`/proc/${parent}/stat`, 'utf8').split(/\)(?=[^)]*$)/);
    return `${parent} ${afterName.trim().split(' ')[1]}`;
  } catch {
    return `${parent}`;
  }
}
