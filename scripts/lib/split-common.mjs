import { createHash } from 'node:crypto';
import { readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** Where people land: what these need is loaded at once, all else when a screen that needs it is opened. */
const LANDING = [
  './_layout.tsx',
  './index.tsx',
  './water/_layout.tsx',
  './water/index.tsx',
  './water/pegs/[pegId].tsx',
];
/** The router opens the layouts of all places before it shows any. @param {string} route */
const isLanding = (route) => LANDING.includes(route) || route.endsWith('/_layout.tsx');
const ADDRESS = '/_expo/static/js/web/';
/** Below this a file of its own costs more than it spares. */
const LEAST_BYTES = 3000;

/** @typedef {{ id: number, text: string, needs: number[], opens: Map<number, string> }} Module */

/** A module's text: its function, its number, and what that function asks for by place. */
const MODULE = /^__d\(.*,(\d+),(\[[^\]]*\]|\{.*\})\);?$/s;

/**
 * One module of the bundle: what it needs at once, and the scripts it opens later. Null for anything else.
 * @param {string} text @returns {Module | null}
 */
export function moduleOf(text) {
  const found = MODULE.exec(text);
  if (!found) return null;
  const { paths = {}, ...wanted } = JSON.parse(found[2] ?? '[]');
  const opens = new Map(Object.entries(paths).map(([id, path]) => [Number(id), String(path)]));
  const needs = Object.values(wanted).filter((id) => typeof id === 'number' && !opens.has(id));
  return { id: Number(found[1]), text, needs, opens };
}

/** A script's statements, each a module or the start of one. @param {string} script */
const statementsOf = (script) => script.split(/\n(?=__[dr]\()/);

/** @param {string} script @returns {Module[]} */
const modulesOf = (script) => statementsOf(script).flatMap((text) => moduleOf(text.trimEnd()) ?? []);

/**
 * All that some modules need at once, themselves included.
 * @param {Iterable<number>} from @param {Map<number, Module>} modules @returns {Set<number>}
 */
function reach(from, modules) {
  const seen = new Set();
  const waiting = [...from];
  for (let id = waiting.pop(); id !== undefined; id = waiting.pop()) {
    if (seen.has(id)) continue;
    seen.add(id);
    waiting.push(...(modules.get(id)?.needs ?? []));
  }
  return seen;
}

/**
 * The screens' files by their module: `./water/pegs/[pegId].tsx`.
 * @param {Map<number, Module>} modules @returns {Map<number, string>}
 */
function routesOf(modules) {
  const routes = new Map();
  for (const { text, opens } of modules.values()) {
    if (!text.includes(`"${LANDING[0]}"`) || opens.size === 0) continue;
    const map = JSON.parse(MODULE.exec(text)?.[2] ?? '{}');
    for (const [, file, at = ''] of text.matchAll(/"(\.\/[^"]+\.tsx)":\{[^}]*?d\[(\d+)\],d\.paths\)/g))
      routes.set(map[at], file);
  }
  return routes;
}

/** `./office/lakes/new.tsx` → `office`; the screens in no folder, such as sign-in, are one place. @param {string} route */
const placeOf = (route) => (route.split('/').length > 2 ? (route.split('/')[1] ?? '') : 'door');

/**
 * Parts the script all screens share: what the landing screens need stays, the rest goes by the places of the program
 * that need it. Null when the bundle is not laid out as expected.
 * @param {{ common: string, others: readonly string[] }} scripts
 * @returns {{ common: string, parts: string[], needs: Map<string, number[]>, screens: Map<string, string> } | null}
 *   needs: a script's parts, screens: the file of the screen it is for ('' for another), both by its address
 */
export function splitCommon({ common, others }) {
  const shared = modulesOf(common);
  const all = [common, ...others].flatMap(modulesOf);
  const modules = new Map(all.map((module) => [module.id, module]));
  const routes = routesOf(modules);
  const known = new Set(routes.values());
  if (shared.length !== statementsOf(common).length || !LANDING.every((route) => known.has(route)))
    return null;
  const landing = [...routes].filter(([, route]) => isLanding(route)).map(([id]) => id);

  const opened = new Map(all.flatMap(({ opens }) => [...opens]));
  const reaches = new Map([...opened.keys()].map((id) => [id, reach([id], modules)]));
  const atOnce = reach([...entryIds(others, modules, opened), ...landing], modules);
  /** @type {Map<number, Set<string>>} */
  const places = new Map();
  for (const [id, reached] of reaches)
    for (const one of reached) {
      if (atOnce.has(one)) continue;
      places.set(one, (places.get(one) ?? new Set()).add(placeOf(routes.get(id) ?? `./${id}`)));
    }

  /** @type {Map<string, Module[]>} */
  const groups = new Map();
  for (const module of shared) {
    const of = [...(places.get(module.id) ?? [])].sort().join(' ');
    if (of) groups.set(of, [...(groups.get(of) ?? []), module]);
  }
  const weightOf = (/** @type {Module[]} */ group) => group.reduce((sum, { text }) => sum + text.length, 0);
  const parts = [...groups.values()].filter((group) => weightOf(group) >= LEAST_BYTES);
  const moved = new Map(parts.flatMap((part, n) => part.map(({ id }) => [id, n])));
  const needs = new Map();
  for (const [id, path] of opened) {
    const of = new Set([...(reaches.get(id) ?? [])].flatMap((one) => moved.get(one) ?? []));
    if (of.size > 0)
      needs.set(
        path,
        [...of].sort((a, b) => a - b),
      );
  }
  const textOf = (/** @type {Module[]} */ list) => list.map(({ text }) => text).join('\n');
  const kept = shared.filter(({ id }) => !moved.has(id));
  const screens = new Map([...opened].map(([id, path]) => [path, routes.get(id) ?? '']));
  return { common: textOf(kept), parts: parts.map(textOf), needs, screens };
}

/**
 * The modules of the scripts no other opens, which run at once.
 * @param {readonly string[]} others @param {Map<number, Module>} modules @param {Map<number, string>} opened
 */
function entryIds(others, modules, opened) {
  return others
    .map(modulesOf)
    .filter((script) => !script.some(({ id }) => opened.has(id)))
    .flatMap((script) => script.map(({ id }) => id));
}

/**
 * Has a script's parts fetched beside it, and the script itself run after them: the router asks for a screen again while
 * it is on its way, and a module that once asked in vain for one of a part stays broken. Runs before the program does,
 * which then sets how a script is fetched.
 * @param {Map<string, readonly string[]>} needs
 */
export const fetchingParts = (needs) =>
  `!function(g,needs,load){` +
  `function ahead(path){var link=document.createElement('link');link.rel='preload';link.as='script';link.href=path;document.head.appendChild(link)}` +
  `function set(one){var begun={};load=function(path){var parts=needs[path];if(!parts)return one(path);` +
  `if(!begun[path]){ahead(path);begun[path]=Promise.all(parts.map(function(part){return one(part)})).then(function(){return one(path)}).catch(function(fault){delete begun[path];throw fault})}` +
  `return begun[path]}}` +
  `Object.defineProperty(g,'__loadBundleAsync',{configurable:!0,get:function(){return load},set:set})` +
  `}(globalThis,${JSON.stringify(Object.fromEntries(needs))});`;

/**
 * Does it to an exported client, before it is compressed. Answers each screen's scripts by its file; nothing when the
 * client was left whole.
 * @param {string} folder @returns {Map<string, string[]>}
 */
export function splitExported(folder) {
  const scripts = join(folder, ...ADDRESS.split('/').filter(Boolean));
  const names = readdirSync(scripts).filter((name) => name.endsWith('.js'));
  const read = (/** @type {string} */ name) => readFileSync(join(scripts, name), 'utf8');
  const commonName = names.find((name) => name.startsWith('__common-'));
  const runtimeName = names.find((name) => name.startsWith('__expo-metro-runtime-'));
  if (!commonName || !runtimeName) return new Map();
  const split = splitCommon({
    common: read(commonName),
    others: names.filter((name) => name !== commonName && name !== runtimeName).map(read),
  });
  if (!split || split.parts.length === 0) return new Map();

  /** Written under a name that changes with it, so that it may be kept for ever. */
  const write = (/** @type {string} */ stem, /** @type {string} */ text) => {
    const name = `${stem}-${createHash('md5').update(text).digest('hex')}.js`;
    writeFileSync(join(scripts, name), text);
    return name;
  };
  const partNames = split.parts.map((text) => write('__part', text));
  const addresses = new Map(
    [...split.needs].map(([path, parts]) => [path, parts.map((n) => ADDRESS + partNames[n])]),
  );
  const renamed = new Map([
    [commonName, write('__common', split.common)],
    [runtimeName, write('__expo-metro-runtime', `${read(runtimeName)}\n${fetchingParts(addresses)}`)],
  ]);
  const page = join(folder, 'index.html');
  let html = readFileSync(page, 'utf8');
  for (const [from, to] of renamed) {
    html = html.replaceAll(from, to);
    rmSync(join(scripts, from));
  }
  writeFileSync(page, html);
  return new Map(
    [...split.screens].map(([path, screen]) => [screen, [path, ...(addresses.get(path) ?? [])]]),
  );
}
