import { runInNewContext } from 'node:vm';
import { describe, expect, it } from 'vitest';
import { fetchingParts, moduleOf, splitCommon } from './split-common.mjs';

const SCREENS = [
  './_layout.tsx',
  './index.tsx',
  './sign-in.tsx',
  './bank/_layout.tsx',
  './bank/index.tsx',
  './office/lakes/new.tsx',
  './office/lakes/[lakeId].tsx',
  './water/_layout.tsx',
  './water/index.tsx',
  './water/pegs/[pegId].tsx',
];
const firstScreenId = 100;
const address = (id: number) => `/_expo/static/js/web/screen-${id}.js`;
const idOf = (screen: string) => firstScreenId + SCREENS.indexOf(screen);

const oneModule = (id: number, needs: readonly number[], body = 'r(d[0])') =>
  `__d(function(g,r,i,a,m,e,d){${body}},${id},[${needs.join(',')}]);`;
const large = (id: number, needs: readonly number[] = []) =>
  oneModule(id, needs, `m.exports="${'x'.repeat(4000)}"`);

/** The module that finds a screen by its file, as the bundler writes it. */
function screensModule(): string {
  const found = SCREENS.map(
    (screen, n) => `"${screen}":{enumerable:!0,get:()=>r(d[1])(d[${n + 2}],d.paths)}`,
  );
  const places = SCREENS.map((_, n) => `"${n + 2}":${firstScreenId + n}`);
  const paths = SCREENS.map((_, n) => `"${firstScreenId + n}":"${address(firstScreenId + n)}"`);
  return `__d(function(g,r,i,a,m,e,d){const t=Object.defineProperties({},{${found.join(',')}})},9,{"0":10,"1":11,${places.join(',')},"paths":{${paths.join(',')}}});`;
}

const NEEDS: Record<string, readonly number[]> = {
  './sign-in.tsx': [50],
  './bank/_layout.tsx': [56],
  './bank/index.tsx': [50, 52],
  './office/lakes/new.tsx': [50, 51],
  './office/lakes/[lakeId].tsx': [51, 52, 56],
  './water/pegs/[pegId].tsx': [53],
};
const bundle = {
  // 50 is a form; 51 is the office's; 52 is small; 53 is the peg page's, with 54 under it; 55 stands below all;
  // 56 is a gate before a place, which the router opens with the rest.
  common: [
    large(50, [55]),
    large(51),
    oneModule(52, []),
    large(53, [54]),
    large(54),
    large(55),
    large(56),
  ].join('\n'),
  others: [
    [screensModule(), oneModule(10, [55]), oneModule(11, []), '__r(9);'].join('\n'),
    ...SCREENS.map((screen) => oneModule(idOf(screen), NEEDS[screen] ?? [])),
  ],
};

describe('the script all screens share', () => {
  it('reads what a module needs at once and what it opens later', () => {
    const read = moduleOf('__d(function(){},7,{"0":3,"1":4,"paths":{"4":"/later.js"}});');
    expect(read).toMatchObject({ id: 7, needs: [3] });
    expect(read?.opens).toEqual(new Map([[4, '/later.js']]));
    expect(moduleOf('__d(function(){f(1,2,{a:"\n"})},8,[3]);')).toMatchObject({ id: 8, needs: [3] });
    expect(moduleOf('__r(9);')).toBeNull();
  });

  it('keeps what the landing screens need, and all that is too small to part', () => {
    const kept = splitCommon(bundle)
      ?.common.split('\n')
      .map((line) => moduleOf(line)?.id);
    expect(kept).toEqual([52, 53, 54, 55, 56]);
  });

  it('parts the rest by the places that need it, and loses nothing', () => {
    const split = splitCommon(bundle);
    expect(split?.parts.map((part) => moduleOf(part)?.id)).toEqual([50, 51]);
    const lines = [split?.common, ...(split?.parts ?? [])].join('\n').split('\n');
    expect(lines.sort()).toEqual(bundle.common.split('\n').sort());
  });

  it('tells each screen’s script its parts', () => {
    expect(splitCommon(bundle)?.needs).toEqual(
      new Map([
        [address(idOf('./sign-in.tsx')), [0]],
        [address(idOf('./bank/index.tsx')), [0]],
        [address(idOf('./office/lakes/new.tsx')), [0, 1]],
        [address(idOf('./office/lakes/[lakeId].tsx')), [1]],
      ]),
    );
  });

  it('leaves a bundle whole that it cannot read', () => {
    expect(splitCommon({ common: 'var a=1;', others: bundle.others })).toBeNull();
    expect(splitCommon({ ...bundle, common: `${bundle.common}\nvar a=1;` })).toBeNull();
    expect(splitCommon({ common: bundle.common, others: [] })).toBeNull();
  });

  /** A page that notes what is asked for ahead of its turn. */
  function aPage(ahead: string[] = []) {
    const head = { appendChild: ({ href }: { href: string }) => ahead.push(href) };
    return { document: { createElement: () => ({}), head } };
  }

  it('runs a script after its parts, fetched beside it and once, however often it is asked for', async () => {
    const [ahead, run]: [string[], string[]] = [[], []];
    const context = { ...aPage(ahead), run };
    runInNewContext(fetchingParts(new Map([['/new.js', ['/form.js']]])), context);
    await runInNewContext(
      `globalThis.__loadBundleAsync = async (path) => { run.push(path) };
       Promise.all([__loadBundleAsync('/new.js'), __loadBundleAsync('/peg.js'), __loadBundleAsync('/new.js')])`,
      context,
    );
    expect(run).toEqual(['/form.js', '/peg.js', '/new.js']);
    expect(ahead).toEqual(['/new.js']);
  });

  it('fails a screen whose part cannot be fetched, and tries it anew when asked again', async () => {
    const context = { ...aPage(), signal: false };
    runInNewContext(fetchingParts(new Map([['/new.js', ['/form.js']]])), context);
    const opening: unknown = runInNewContext(
      `globalThis.__loadBundleAsync = async (path) => { if (!signal && path === '/form.js') throw 'no signal' };
       __loadBundleAsync('/new.js')`,
      context,
    );
    await expect(opening).rejects.toBe('no signal');
    context.signal = true;
    await expect(runInNewContext(`__loadBundleAsync('/new.js')`, context)).resolves.toBeUndefined();
  });
});
