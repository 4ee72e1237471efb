import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import ts from 'typescript';
import { ROOT } from './layers.mjs';

/** A parsed file of ours; `path` from the root with slashes. */
export interface SourceFile {
  readonly path: string;
  readonly text: string;
  readonly lines: number;
  readonly tree: ts.SourceFile;
}

const FOLDERS = ['app', 'components', 'db', 'lib'];
const ROOT_FILES = ['proxy.ts', 'instrumentation.ts'];
const SKIPPED = new Set(['node_modules', '.next', '.data']);

/** Every TypeScript file below these folders, parsed. */
export function readSourceFiles(folders: readonly string[] = FOLDERS): readonly SourceFile[] {
  const inFolders = folders.flatMap((folder) => [...filesBelow(folder)]);
  const atRoot = readdirSync(ROOT).filter((name) => ROOT_FILES.includes(name));
  return [...inFolders, ...atRoot].filter((file) => /(?<!\.d)\.tsx?$/.test(file)).map(parseFile);
}

function* filesBelow(folder: string): Generator<string> {
  for (const entry of readdirSync(path.join(ROOT, folder), { withFileTypes: true })) {
    const place = `${folder}/${entry.name}`;
    if (entry.isDirectory() && !SKIPPED.has(entry.name)) yield* filesBelow(place);
    else if (entry.isFile()) yield place;
  }
}

function parseFile(file: string): SourceFile {
  const text = readFileSync(path.join(ROOT, file), 'utf8');
  const tree = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true, file.endsWith('x') ? ts.ScriptKind.TSX : ts.ScriptKind.TS);
  return { path: file, text, lines: text.trimEnd().split('\n').length, tree };
}

export function visitNodes(root: ts.Node, visit: (node: ts.Node) => void): void {
  const enter = (node: ts.Node): void => {
    visit(node);
    ts.forEachChild(node, enter);
  };
  enter(root);
}

export function lineOf(file: SourceFile, node: ts.Node): number {
  return file.tree.getLineAndCharacterOfPosition(node.getStart(file.tree)).line + 1;
}

/** Every specifier a file imports or re-exports from, `import()` and `import('…')` types included. */
export function importsOf(file: SourceFile): readonly string[] {
  const specifiers: string[] = [];
  const add = (node: ts.Node | undefined) => {
    if (node && ts.isStringLiteralLike(node)) specifiers.push(node.text);
  };
  visitNodes(file.tree, (node) => {
    if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) add(node.moduleSpecifier);
    if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) add(node.arguments[0]);
    if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) add(node.argument.literal);
  });
  return specifiers;
}

/** Where each function starts and how many lines it has, its signature included. */
export function functionsOf(file: SourceFile): readonly { readonly line: number; readonly lines: number }[] {
  const found: { line: number; lines: number }[] = [];
  visitNodes(file.tree, (node) => {
    if (!ts.isFunctionLike(node) || !('body' in node) || !node.body) return;
    const line = lineOf(file, node);
    const end = file.tree.getLineAndCharacterOfPosition(node.getEnd()).line + 1;
    found.push({ line, lines: end - line + 1 });
  });
  return found;
}
