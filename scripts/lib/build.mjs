import {
  cpSync,
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';
import { Halt } from './halt.mjs';
import { alone } from './lock.mjs';
import { toolEnvironment } from './machine.mjs';
import { at, ownFolder } from './paths.mjs';
import { run } from './run.mjs';
import { writeServiceWorker } from './service-worker.mjs';
import { contentHash } from './sources.mjs';
import { splitExported } from './split-common.mjs';

export const webFolder = at('apps', 'mobile', 'dist');
export const apiFolder = at('apps', 'api', 'dist');

const shared = [
  'packages/shared/src',
  'packages/shared/package.json',
  'pnpm-lock.yaml',
  'scripts/lib/build.mjs',
];
const webSources = [
  'apps/mobile',
  'fonts',
  'scripts/lib/split-common.mjs',
  'scripts/lib/service-worker.mjs',
  ...shared,
];
const apiSources = [
  'apps/api/src',
  'apps/api/package.json',
  'packages/db/src',
  'packages/db/package.json',
  ...shared,
];

/**
 * Builds something again only when what it is built from has changed or it is gone.
 * @param {{ name: string, sources: string[], proof: string }} thing proof: a file that is there when it is built
 * @param {(text: string) => void} note @param {() => Promise<void>} build
 */
async function whenChanged({ name, sources, proof }, note, build) {
  const mark = join(ownFolder('built'), name);
  const fresh = () =>
    existsSync(mark) && existsSync(proof) && readFileSync(mark, 'utf8') === contentHash(sources);
  if (fresh()) return note('unchanged');
  await alone(`${mark}.lock`, note, async () => {
    if (fresh()) return note('unchanged');
    const hash = contentHash(sources);
    rmSync(mark, { force: true });
    note('building');
    await build();
    writeFileSync(mark, hash);
  });
}

/** @param {string} folder @param {RegExp} ending @returns {string[]} */
function filesEnding(folder, ending) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && ending.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

/** The server's programs: itself, its worker threads, and what prepares a database. */
function apiEntries() {
  const workers = filesEnding(at('apps', 'api', 'src'), /\.worker\.ts$/);
  const named = [
    'apps/api/src/main.ts',
    'packages/db/src/migrate.ts',
    'apps/api/src/demo/seed.ts',
    'apps/api/src/demo/room-for-demo.ts',
    'apps/api/src/demo/card-provider/main.ts',
  ].map((path) => at(...path.split('/')));
  return [...named.filter((path) => existsSync(path)), ...workers];
}

/** @param {(text: string) => void} note */
export function buildApi(note) {
  return whenChanged(
    { name: 'api', sources: apiSources, proof: join(apiFolder, 'main.js') },
    note,
    async () => {
      const { build } = await import('esbuild');
      rmSync(apiFolder, { recursive: true, force: true });
      const bundled = await build({
        entryPoints: apiEntries().map((path) => ({
          in: path,
          out: path.replace(/^.*\/src\//, '').replace(/\.ts$/, ''),
        })),
        outdir: apiFolder,
        bundle: true,
        splitting: true,
        format: 'esm',
        platform: 'node',
        target: 'node20',
        keepNames: true,
        sourcemap: true,
        tsconfig: at('tsconfig.json'),
        plugins: [onlyOursInside],
        logLevel: 'silent',
      }).catch((error) => {
        throw new Halt(
          `The server could not be built:\n${error instanceof Error ? error.message : String(error)}`,
        );
      });
      for (const warning of bundled.warnings) note(warning.text);
    },
  );
}

/** Packages stay outside the bundle; the workspace's own sources go inside. @type {import('esbuild').Plugin} */
const onlyOursInside = {
  name: 'only-ours-inside',
  setup(build) {
    build.onResolve({ filter: /^[^./]/ }, ({ path, kind }) => {
      if (kind === 'entry-point' || path.startsWith('@mereward/')) return undefined;
      return { path, external: true };
    });
  },
};

/** @param {(text: string) => void} note */
export function buildWeb(note) {
  return whenChanged(
    { name: 'web', sources: webSources, proof: join(webFolder, 'index.html') },
    note,
    async () => {
      const next = at('apps', 'mobile', 'dist-next');
      rmSync(next, { recursive: true, force: true });
      const env = { ...toolEnvironment(), NODE_ENV: 'production', TMPDIR: ownFolder('tmp') };
      const expo = at('apps', 'mobile', 'node_modules', '.bin', 'expo');
      const exported = await run(expo, ['export', '-p', 'web', '--output-dir', 'dist-next'], {
        cwd: at('apps', 'mobile'),
        env,
        onText: (text) => progressOf(text, note),
      });
      if (exported.code !== 0 || !existsSync(join(next, 'index.html'))) {
        throw new Halt(`The client could not be built:\n${exported.output.slice(-3000)}`);
      }
      // The export keeps the face as a link to where this clone stands now; the file itself outlives a move.
      rmSync(join(next, 'fonts'), { recursive: true, force: true });
      cpSync(at('fonts'), join(next, 'fonts'), { recursive: true });
      const scriptsOf = splitExported(next);
      if (scriptsOf.size === 0) note('the script all screens share was left whole');
      for (const warning of await writeServiceWorker(next, scriptsOf)) note(warning);
      note('compressing');
      await compressBeside(next);
      rmSync(webFolder, { recursive: true, force: true });
      mkdirSync(at('apps', 'mobile'), { recursive: true });
      renameSync(next, webFolder);
    },
  );
}

/** @param {string} text @param {(text: string) => void} note */
function progressOf(text, note) {
  const share = /(\d+(?:\.\d+)?)%/.exec(text)?.[1];
  if (share) note(`${Math.round(Number(share))} %`);
}

const toBrotli = promisify(brotliCompress);
const toGzip = promisify(gzip);

/** Writes a .br and a .gz beside every text file, so that the server never compresses one twice. @param {string} folder */
async function compressBeside(folder) {
  for (const file of filesEnding(folder, /\.(js|css|html|json|svg|ttf|ico|map|webmanifest)$/)) {
    const plain = readFileSync(file);
    const params = { [constants.BROTLI_PARAM_QUALITY]: 11, [constants.BROTLI_PARAM_SIZE_HINT]: plain.length };
    const [br, gz] = await Promise.all([toBrotli(plain, { params }), toGzip(plain, { level: 9 })]);
    writeFileSync(`${file}.br`, br);
    writeFileSync(`${file}.gz`, gz);
  }
}
