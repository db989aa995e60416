const lineEveryMs = 20_000;
const isTerminal = Boolean(process.stdout.isTTY);

/** @param {number} sinceMs */
export const elapsed = (sinceMs) => `${((performance.now() - sinceMs) / 1000).toFixed(1)} s`;

/**
 * Shows one step of the set-up while it works: its name, what it says meanwhile, the time it has taken.
 * @template T
 * @param {string} title
 * @param {(note: (text: string) => void) => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(title, work) {
  const startedMs = performance.now();
  const show = liveLine(title, startedMs);
  try {
    const answer = await work(show.note);
    show.end('✓');
    return answer;
  } catch (error) {
    show.end('✗');
    throw error;
  }
}

/** @param {string} title @param {number} startedMs */
function liveLine(title, startedMs) {
  let said = '';
  const draw = () => {
    const text = `  ${title}${said ? `: ${said}` : ''} … ${elapsed(startedMs)}`;
    if (isTerminal) process.stdout.write(`\r\x1b[K${text.slice(0, (process.stdout.columns ?? 100) - 1)}`);
    else process.stdout.write(`${text}\n`);
  };
  const timer = setInterval(draw, isTerminal ? 250 : lineEveryMs);
  if (isTerminal) draw();
  return {
    /** @param {string} text */
    note(text) {
      said = text.trim();
      if (isTerminal) draw();
    },
    /** @param {string} sign */
    end(sign) {
      clearInterval(timer);
      const clear = isTerminal ? '\r\x1b[K' : '';
      process.stdout.write(`${clear}${sign} ${title}${said ? `: ${said}` : ''} (${elapsed(startedMs)})\n`);
    },
  };
}
