import { spawnSync } from 'node:child_process';
import { accessSync, constants, mkdirSync } from 'node:fs';
import { ownFolder, root } from './paths.mjs';
import { Halt } from './halt.mjs';

export const isRoot = process.getuid?.() === 0;

/** The program is proven on Node 20 alone; another major would fail later and less clearly. */
export function requireNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major === 20 && minor >= 19) return;
  throw new Halt(
    `This needs Node 20.19 or a later Node 20; you have ${process.version}. Install Node 20 and start again.`,
  );
}

/** @param {string} folder */
function writable(folder) {
  try {
    mkdirSync(folder, { recursive: true });
    accessSync(folder, constants.W_OK);
    return true;
  } catch {
    return false;
  }
}

export function requireWritableRoot() {
  if (writable(root)) return;
  throw new Halt(
    `This folder can't be written to by you: ${root}. Clone the project into a folder of your own and start there.`,
  );
}

/**
 * The environment for every program started here. Tools keep caches under HOME; where HOME can't be
 * written to, a folder of the project's own stands in. Temporary files stay in the project too, because
 * Metro keeps its cache in the shared one, where another user's leftovers stop it.
 * @returns {NodeJS.ProcessEnv}
 */
export function toolEnvironment() {
  const home = process.env.HOME;
  /** @type {NodeJS.ProcessEnv} */
  const env = { ...process.env, CI: '1', EXPO_NO_TELEMETRY: '1', EXPO_OFFLINE: '1', EXPO_NO_DOTENV: '1' };
  if (home && writable(home)) return env;
  const standIn = ownFolder('home');
  const { XDG_DATA_HOME: _data, XDG_CACHE_HOME: _cache, XDG_CONFIG_HOME: _config, ...rest } = env;
  return { ...rest, HOME: standIn, npm_config_cache: ownFolder('home', 'npm') };
}

/** How to run a program with the rights to install packages, or undefined when nobody here has them. */
function installer() {
  if (spawnSync('apt-get', ['--version']).status !== 0) return undefined;
  if (isRoot) return [];
  return spawnSync('sudo', ['-n', 'true']).status === 0 ? ['sudo', '-n'] : undefined;
}

/**
 * Installs Debian packages, waiting for another apt to finish.
 * @param {string[]} names
 * @param {string} otherwise what to tell a person whose machine can't do it by itself
 * @param {(command: string, args: string[], options: object) => Promise<{ code: number, output: string }>} runProgram
 */
export async function installPackages(names, otherwise, runProgram) {
  const prefix = installer();
  if (!prefix) throw new Halt(otherwise);
  /** @param {string[]} args */
  const apt = (args) => {
    const all = [
      ...prefix,
      'env',
      'DEBIAN_FRONTEND=noninteractive',
      'apt-get',
      '-o',
      'DPkg::Lock::Timeout=300',
      ...args,
    ];
    return runProgram(all[0] ?? 'env', all.slice(1), { cwd: '/' });
  };
  const install = ['install', '-y', '--no-install-recommends', ...names];
  if ((await apt(install)).code === 0) return;
  await apt(['update']);
  const second = await apt(install);
  if (second.code !== 0)
    throw new Halt(`${otherwise}\napt-get could not do it here:\n${second.output.slice(-1500)}`);
}

/** Runs one shell line with the installer's rights. @param {string} line */
export function asInstaller(line) {
  const prefix = installer();
  if (!prefix) return;
  const all = [...prefix, 'sh', '-c', line];
  spawnSync(all[0] ?? 'sh', all.slice(1), { stdio: 'ignore', cwd: '/' });
}
