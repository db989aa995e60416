import { readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

const SCRIPTS = '_expo/static/js/web/';

/** Screens that must open where there is no signal, though they were never opened before. @param {string} route */
const neededOnTheBank = (route) =>
  /^\.\/(bank\/|water\/|tickets\/(bookings\/|mine)|index|emergency|waiting|me\/index|sign-in|\+not-found|_layout)/.test(
    route,
  ) || route.endsWith('/_layout.tsx');

/** Pictures, and faces of other scripts, are fetched when they are wanted. @param {string} file */
const ofTheShell = (file) =>
  /^(index\.html|ground\.css|app\.webmanifest|favicon\.svg|icons\/icon-192\.png)$/.test(file) ||
  /^fonts\/.*\.woff2$/.test(file);

/**
 * What a first visit brings onto the device once it has loaded: the page, its styles and face, the scripts all screens
 * share, and those of the screens needed on the bank. Other screens' scripts are kept as they are opened.
 * @param {string} folder the exported client
 * @param {ReadonlyMap<string, readonly string[]>} scriptsOf a screen's scripts by its file, as addresses
 * @returns {string[]} files from the folder
 */
export function keptAhead(folder, scriptsOf) {
  const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((file) =>
    statSync(join(folder, file)).isFile(),
  );
  const all = new Set([...scriptsOf.values()].flat());
  const needed = new Set(
    [...scriptsOf].flatMap(([route, scripts]) => (neededOnTheBank(route) ? scripts : [])),
  );
  return files
    .filter((file) => {
      const address = `/${file}`;
      if (!file.startsWith(SCRIPTS)) return ofTheShell(file);
      const openedLater =
        all.has(address) || !/^(entry|__common|__expo-metro-runtime)-/.test(file.slice(SCRIPTS.length));
      return file.endsWith('.js') && (!openedLater || needed.has(address) || scriptsOf.size === 0);
    })
    .sort();
}

/**
 * Writes the worker that keeps the program on the device, `sw.js`, with all it needs inside.
 * @param {string} folder @param {ReadonlyMap<string, readonly string[]>} scriptsOf
 */
export async function writeServiceWorker(folder, scriptsOf) {
  const { generateSW } = await import('workbox-build');
  const { warnings } = await generateSW({
    swDest: join(folder, 'sw.js'),
    globDirectory: folder,
    globPatterns: keptAhead(folder, scriptsOf).map((file) => file.replace(/[[\]()!*?{}]/g, '\\$&')),
    maximumFileSizeToCacheInBytes: 4_000_000,
    dontCacheBustURLsMatching: /-[0-9a-f]{32}\.js$/, // such a name changes with its content
    inlineWorkboxRuntime: true,
    sourcemap: false,
    mode: 'production',
    cacheId: 'mereward',
    cleanupOutdatedCaches: true,
    clientsClaim: true, // the first visit is kept too, so that it outlives the signal
    skipWaiting: false, // a newer program waits until somebody asks for it: never under a half-typed form
    navigateFallback: '/index.html',
    navigateFallbackDenylist: [/^\/api\//, /^\/p\//, /^\/demo\//, /\/[^/]+\.[^/]+$/],
    runtimeCaching: [
      {
        urlPattern: ({ url, sameOrigin }) => sameOrigin && /^\/(_expo\/static|assets)\//.test(url.pathname),
        handler: 'CacheFirst',
        options: { cacheName: 'mereward-screens', expiration: { maxEntries: 120 } },
      },
    ],
  });
  return warnings;
}
