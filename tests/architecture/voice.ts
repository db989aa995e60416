import ts from 'typescript';
import { isTest } from './resolution';
import { lineOf, visit, type SourceFile } from './source-file';

const longest = 400;

/** Words that hide what the code says, and marks of work left undone. Each is spelt so that it does not find itself. */
const unwanted: [string, RegExp][] = [
  ['switches the type checker off', new RegExp(`@ts-${'(ignore|nocheck|expect-error)'}`)],
  ['switches lint off', new RegExp(`eslint-${'disable'}`)],
  ['prints by console', new RegExp(`console\\.${'log'}\\(`)],
  ['leaves a note of work undone', new RegExp(`\\b(${['TO', 'FIX'].join('DO|')}ME)\\b`)],
  [
    'names a folder of one machine',
    new RegExp(`(^|[\\s'"\`(=])/(${['work', 'tmp', 'root', 'home', 'Users'].join('|')})/\\w`),
  ],
];

const bannedStems = new Set([
  'utils',
  'util',
  'helpers',
  'helper',
  'common',
  'manager',
  'data',
  'info',
  'misc',
]);
const mayExportDefault =
  /(^apps\/mobile\/src\/app\/)|(\.config\.(ts|mjs|js)$)|(\.worker\.ts$)|(^tests\/(support|e2e)\/)/;

export function longFiles(files: readonly SourceFile[]): string[] {
  return files
    .map((file) => ({ path: file.path, lines: file.text.split('\n').length - 1 }))
    .filter(({ lines }) => lines > longest)
    .map(({ path, lines }) => `${path} has ${lines} lines; ${longest} is the most`);
}

export function unwantedWords(files: readonly SourceFile[]): string[] {
  return files.flatMap((file) =>
    file.text
      .split('\n')
      .flatMap((text, index) =>
        unwanted
          .filter(([, pattern]) => pattern.test(text))
          .map(([fault]) => `${file.path}:${index + 1} ${fault}`),
      ),
  );
}

export function badNames(files: readonly SourceFile[]): string[] {
  return files.flatMap(({ path }) => {
    const isRoute = path.startsWith('apps/mobile/src/app/');
    const isMigration = /\/migrations\/\d+-[A-Z]\w*\.ts$/.test(path);
    const segments = path.split('/');
    const stems = segments.map((segment) => segment.replace(/\..*$/, ''));
    const stem = stems.at(-1) ?? '';
    if (!isRoute && stems.some((each) => bannedStems.has(each))) return [`${path} says nothing by its name`];
    if (!isRoute && stem === 'index') return [`${path} is an index; name the file for what it exports`];
    if (!isRoute && !isMigration && !/^[a-z0-9]+(-[a-z0-9]+)*$/.test(stem))
      return [`${path} is not in kebab-case`];
    return [];
  });
}

/** `any`, I-prefixes, default and star exports, and test titles that say "should". */
export function looseCode(files: readonly SourceFile[]): string[] {
  return files.flatMap((file) => {
    const faults: string[] = [];
    visit(file.tree, (node) => {
      const fault = faultOf(node, file.path);
      if (fault) faults.push(`${file.path}:${lineOf(file.tree, node)} ${fault}`);
    });
    return faults;
  });
}

function faultOf(node: ts.Node, path: string): string | undefined {
  if (node.kind === ts.SyntaxKind.AnyKeyword) return 'says any';
  if (ts.isInterfaceDeclaration(node) && /^I[A-Z]/.test(node.name.text))
    return 'marks an interface with an I';
  if (ts.isExportDeclaration(node) && !node.exportClause && node.moduleSpecifier)
    return 'exports everything by a star';
  if (isDefaultExport(node) && !mayExportDefault.test(path) && path !== 'vitest.config.ts')
    return 'exports a default';
  if (ts.isCallExpression(node) && isTest(path) && titleOf(node)?.match(/\bshould\b/))
    return 'titles a test with “should”';
  return undefined;
}

function isDefaultExport(node: ts.Node): boolean {
  if (ts.isExportAssignment(node)) return true;
  return (
    ts.canHaveModifiers(node) &&
    (ts.getModifiers(node) ?? []).some((each) => each.kind === ts.SyntaxKind.DefaultKeyword)
  );
}

function titleOf(call: ts.CallExpression): string | undefined {
  const [first] = call.arguments;
  const named = ts.isIdentifier(call.expression) && /^(test|it|describe)$/.test(call.expression.text);
  return named && first && ts.isStringLiteralLike(first) ? first.text : undefined;
}
