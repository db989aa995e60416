import { readFileSync, readdirSync } from 'node:fs';
import { join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

export interface Import {
  specifier: string;
  /** True when nothing is left of it at run time. */
  typeOnly: boolean;
  line: number;
}

export interface SourceFile {
  /** From the checkout's folder, with forward slashes. */
  path: string;
  text: string;
  tree: ts.SourceFile;
  imports: Import[];
}

export const checkout = fileURLToPath(new URL('../..', import.meta.url));

const skipped = new Set([
  'node_modules',
  'dist',
  'dist-next',
  '.expo',
  '.data',
  '.git',
  'coverage',
  'fixtures',
]);
const isSource = (name: string): boolean => /\.(ts|tsx|mjs|js)$/.test(name) && !name.endsWith('.d.ts');

/** Every source file of the project below a folder, in a fixed order. */
export function projectFiles(folder = checkout): SourceFile[] {
  const found: SourceFile[] = [];
  for (const entry of readdirSync(folder, { withFileTypes: true }).sort((a, b) =>
    a.name < b.name ? -1 : 1,
  )) {
    const full = join(folder, entry.name);
    if (entry.isDirectory() && !skipped.has(entry.name)) found.push(...projectFiles(full));
    else if (entry.isFile() && isSource(entry.name))
      found.push(sourceFile(asPath(full), readFileSync(full, 'utf8')));
  }
  return found;
}

const asPath = (full: string): string => relative(checkout, full).split(sep).join('/');

/** Parses one file; `text` may be invented, to prove that a rule can fail. */
export function sourceFile(path: string, text: string): SourceFile {
  const kind = path.endsWith('x') ? ts.ScriptKind.TSX : ts.ScriptKind.TS;
  const tree = ts.createSourceFile(path, text, ts.ScriptTarget.ES2022, true, kind);
  const imports: Import[] = [];
  visit(tree, (node) => {
    const found = importOf(node);
    if (found) imports.push({ ...found, line: lineOf(tree, node) });
  });
  return { path, text, tree, imports };
}

/** Calls `see` for a node and everything below it. */
export function visit(node: ts.Node, see: (node: ts.Node) => void): void {
  see(node);
  ts.forEachChild(node, (child) => visit(child, see));
}

export const lineOf = (tree: ts.SourceFile, node: ts.Node): number =>
  tree.getLineAndCharacterOfPosition(node.getStart(tree)).line + 1;

function importOf(node: ts.Node): { specifier: string; typeOnly: boolean } | undefined {
  if (ts.isImportDeclaration(node) && ts.isStringLiteral(node.moduleSpecifier)) {
    return { specifier: node.moduleSpecifier.text, typeOnly: isTypeOnly(node.importClause) };
  }
  if (ts.isExportDeclaration(node) && node.moduleSpecifier && ts.isStringLiteral(node.moduleSpecifier)) {
    return { specifier: node.moduleSpecifier.text, typeOnly: node.isTypeOnly };
  }
  if (
    ts.isImportTypeNode(node) &&
    ts.isLiteralTypeNode(node.argument) &&
    ts.isStringLiteral(node.argument.literal)
  ) {
    return { specifier: node.argument.literal.text, typeOnly: true };
  }
  if (ts.isCallExpression(node)) return importCall(node);
  return undefined;
}

function isTypeOnly(clause: ts.ImportClause | undefined): boolean {
  if (!clause) return false;
  if (clause.isTypeOnly) return true;
  const named = clause.namedBindings;
  if (clause.name || !named || !ts.isNamedImports(named)) return false;
  return named.elements.length > 0 && named.elements.every((element) => element.isTypeOnly);
}

function importCall(node: ts.CallExpression): { specifier: string; typeOnly: boolean } | undefined {
  const [first] = node.arguments;
  if (!first || !ts.isStringLiteral(first)) return undefined;
  const isDynamic = node.expression.kind === ts.SyntaxKind.ImportKeyword;
  const isRequire = ts.isIdentifier(node.expression) && node.expression.text === 'require';
  return isDynamic || isRequire ? { specifier: first.text, typeOnly: false } : undefined;
}
