/** Where a logger writes to in a test: every line so far, parsed and as written. */
export function aLog() {
  const written: string[] = [];
  return {
    stream: { write: (line: string) => void written.push(line) },
    text: () => written.join(''),
    lines: (): Record<string, unknown>[] => written.map((line) => JSON.parse(line)),
  };
}
