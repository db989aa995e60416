import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';

/** The entries that run beside the server; each is `<name>.worker.ts` in the source and `<name>.worker.js` in the bundle. */
export type ThreadName =
  | 'bookings/ticket'
  | 'charts/build'
  | 'charts/part'
  | 'charts/papers/paper'
  | 'files/resize'
  | 'rules/sheet'
  | 'surveys/log';

const source = import.meta.url.endsWith('.ts');

/** Where a thread's entry lies: beside the bundle once built, in its word's folder before. */
export function threadEntry(name: ThreadName): { url: URL; execArgv: string[] } {
  if (!source) return { url: new URL(`./${name}.worker.js`, import.meta.url), execArgv: [] };
  return { url: new URL(`../${name}.worker.ts`, import.meta.url), execArgv: ['--import', readsSource()] };
}

/** A module that lets a thread read TypeScript. The loader's own entry does that for the main thread alone. */
export function readsSource(): string {
  const tsx = createRequire(fileURLToPath(import.meta.url)).resolve('tsx/package.json');
  const from = JSON.stringify(new URL('./dist/esm/api/index.mjs', pathToFileURL(tsx)).href);
  return `data:text/javascript,${encodeURIComponent(`import { register } from ${from}; register();`)}`;
}

/** Starts a thread for heavy work. What it is given and answers must survive structured cloning. */
export function openThread(name: ThreadName, workerData: unknown): Worker {
  const { url, execArgv } = threadEntry(name);
  return new Worker(url, { workerData, execArgv });
}
