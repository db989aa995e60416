import { isTest, pathsOf, targetOf } from './resolution';
import type { SourceFile } from './source-file';
import { roomOf } from './walls';

/** Which words each word may import: straight downhill; what lies further down follows from it. */
export const downhill: Record<string, string[]> = {
  mail: [],
  files: [],
  accounts: ['mail', 'files'],
  fisheries: ['accounts', 'files', 'mail'],
  lakes: ['fisheries'],
  surveys: ['lakes'],
  charts: ['surveys', 'notices'],
  water: ['lakes'],
  stock: ['lakes'],
  closures: ['lakes'],
  rules: ['lakes'],
  notices: ['lakes'],
  tickets: ['lakes'],
  payments: ['fisheries'],
  bookings: ['tickets', 'rules', 'closures', 'notices', 'payments', 'charts'],
  rounds: ['bookings'],
  works: ['bookings'],
  members: ['bookings'],
};

/** Where words live, and which folders beside them are foundations. `free` folders put everything together. */
const homes = [
  { home: 'apps/api/src/', foundations: ['http', 'jobs', 'pdf'], free: ['demo'] },
  {
    home: 'packages/shared/src/',
    foundations: ['problems', 'money', 'time', 'units', 'geometry', 'writing'],
    free: [],
  },
  { home: 'packages/db/src/entities/', foundations: [], free: [] },
  { home: 'apps/mobile/src/features/', foundations: [], free: [] },
  {
    home: 'apps/mobile/src/',
    foundations: ['components', 'hooks', 'constants', 'lib'],
    free: ['app', 'features'],
  },
];

type Place = { kind: 'word' | 'foundation' | 'free' | 'unknown'; name: string };

export function placeOf(path: string): Place | undefined {
  const home = homes.find((each) => path.startsWith(each.home));
  if (!home) return undefined;
  const [folder = '', ...rest] = path.slice(home.home.length).split('/');
  if (rest.length === 0 || home.free.includes(folder)) return { kind: 'free', name: folder };
  if (home.foundations.includes(folder)) return { kind: 'foundation', name: folder };
  return { kind: folder in downhill ? 'word' : 'unknown', name: folder };
}

function reachable(word: string, seen = new Set<string>()): Set<string> {
  for (const lower of downhill[word] ?? []) {
    if (seen.has(lower)) continue;
    seen.add(lower);
    reachable(lower, seen);
  }
  return seen;
}

/** Imports that climb: a word to one above it, a foundation to a word; and folders that are no word of ours. */
export function climbs(files: readonly SourceFile[]): string[] {
  const known = pathsOf(files);
  const faults: string[] = [];
  for (const file of files) {
    const from = placeOf(file.path);
    if (!from || isTest(file.path)) continue;
    if (from.kind === 'unknown') faults.push(`${file.path} “${from.name}” is no word or foundation of ours`);
    for (const { specifier, line } of file.imports) {
      const target = targetOf(file.path, specifier, known);
      if (target.kind === 'package') continue;
      const to = placeOf(target.path);
      if (to?.kind === 'word' && !mayReach(from, to.name, roomOf(file.path) === roomOf(target.path))) {
        faults.push(`${file.path}:${line} ${from.name} may not import ${to.name} (${specifier})`);
      }
    }
  }
  return faults;
}

/** A foundation is held to this inside its own room; what a lower room says of a word it may know. */
function mayReach(from: Place, word: string, sameRoom: boolean): boolean {
  if (from.kind === 'free' || (from.kind === 'foundation' && !sameRoom)) return true;
  return from.kind === 'word' && (from.name === word || reachable(from.name).has(word));
}
