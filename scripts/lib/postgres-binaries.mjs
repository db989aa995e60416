import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { asInstaller, installPackages, isRoot } from './machine.mjs';
import { Halt } from './halt.mjs';
import { run } from './run.mjs';

const debianFolder = '/usr/lib/postgresql';
export const oldestMajor = 15;

const missing =
  'PostgreSQL is not installed and can’t be installed from here: install the server (on Debian or Ubuntu: sudo apt-get install postgresql), or set PG_BIN to the folder of its programs, or DATABASE_URL to a database of your own, and start again.';

/**
 * Candidate folders, newest Debian version first.
 * @returns {string[]}
 */
function candidates() {
  const versions = existsSync(debianFolder) ? readdirSync(debianFolder) : [];
  const debian = versions
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => join(debianFolder, version, 'bin'));
  const path = (process.env.PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  return [...(process.env.PG_BIN ? [process.env.PG_BIN] : []), ...debian, ...path];
}

/** @param {string} folder @returns {number | undefined} the major version of the server there */
function majorIn(folder) {
  if (!existsSync(join(folder, 'initdb')) || !existsSync(join(folder, 'postgres'))) return undefined;
  const said =
    spawnSync(join(folder, 'postgres'), ['--version'], { encoding: 'utf8', cwd: '/' }).stdout ?? '';
  const major = Number(/(\d+)/.exec(said)?.[1]);
  return Number.isFinite(major) ? major : undefined;
}

/** The program keeps two parties off one peg with an index method that lives in an extension. @param {string} folder */
function hasExtensions(folder) {
  const config = spawnSync(join(folder, 'pg_config'), ['--sharedir'], { encoding: 'utf8', cwd: '/' });
  const shared = config.status === 0 ? config.stdout.trim() : folder.replace(/lib(.*)\/bin$/, 'share$1');
  return existsSync(join(shared, 'extension', 'btree_gist.control'));
}

/** @param {string | undefined} major */
function find(major) {
  for (const folder of candidates()) {
    const found = majorIn(folder);
    if (found === undefined || found < oldestMajor || (major && String(found) !== major)) continue;
    if (hasExtensions(folder)) return folder;
  }
  return undefined;
}

/** Debian's package makes and starts a server of its own unless it is told not to; it is asked to for this install only. */
async function installServer() {
  const setting = '/etc/postgresql-common/createcluster.conf';
  const keep = mkdtempSync(join(tmpdir(), 'createcluster-'));
  const kept = join(keep, 'createcluster.conf');
  await installPackages(['postgresql-common'], missing, run);
  asInstaller(`cp '${setting}' '${kept}' && echo 'create_main_cluster = false' >> '${setting}'`);
  try {
    await installPackages(['postgresql'], missing, run);
  } finally {
    asInstaller(`cp '${kept}' '${setting}'`);
    rmSync(keep, { recursive: true, force: true });
  }
}

/**
 * The folder of PostgreSQL's programs, installed from Debian's packages when there is none.
 * @param {{ major?: string, note?: (text: string) => void }} wish major: the version an existing cluster needs
 */
export async function postgresBinaries({ major, note } = {}) {
  const found = find(major);
  if (found) return found;
  if (major && find(undefined)) {
    throw new Halt(
      `The demo's database was made by PostgreSQL ${major}, which is no longer installed: install it again, or delete the folder .data/pg to begin with an empty one.`,
    );
  }
  note?.('installing Debian’s server package');
  await installServer();
  const installed = find(major);
  if (!installed) throw new Halt(missing);
  return installed;
}

/**
 * Whom the server runs as: PostgreSQL refuses root, so root hands over to the `postgres` user.
 * @returns {{ uid?: number, gid?: number }}
 */
export function serverUser() {
  if (!isRoot) return {};
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((each) => each.startsWith('postgres:'));
  const [, , uid, gid] = (line ?? '').split(':');
  if (uid && gid) return { uid: Number(uid), gid: Number(gid) };
  throw new Halt(
    'PostgreSQL will not run as root and this machine has no user named postgres: make one (useradd -r postgres), or start as an ordinary user.',
  );
}
