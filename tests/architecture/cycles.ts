import { pathsOf, targetOf } from './resolution';
import type { SourceFile } from './source-file';

/** Rings of files that need one another at run time, each told once, from its first path in order. */
export function valueCycles(files: readonly SourceFile[]): string[] {
  const known = pathsOf(files);
  const edges = new Map(files.map((file) => [file.path, valueTargets(file, known)]));
  const done = new Set<string>();
  const trail: string[] = [];
  const found: string[] = [];
  const walk = (path: string): void => {
    const at = trail.indexOf(path);
    if (at >= 0) {
      found.push([...trail.slice(at), path].join(' → '));
      return;
    }
    if (done.has(path)) return;
    trail.push(path);
    for (const next of edges.get(path) ?? []) walk(next);
    trail.pop();
    done.add(path);
  };
  for (const file of files) walk(file.path);
  return found;
}

function valueTargets(file: SourceFile, known: ReadonlySet<string>): string[] {
  return file.imports
    .filter((each) => !each.typeOnly)
    .map((each) => targetOf(file.path, each.specifier, known))
    .flatMap((target) => (target.kind === 'ours' && known.has(target.path) ? [target.path] : []));
}
