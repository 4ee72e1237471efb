import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { checkImport, findLayer } from '../support/layers/layers.mjs';
import { type SourceFile, functionsOf, importsOf, lineOf, readSourceFiles, visitNodes } from '../support/layers/source-files';

const files = readSourceFiles();

describe('the import rule', () => {
  it('places every file of lib, db, app and components in a layer', () => {
    expect(files.filter((file) => !findLayer(file.path)).map((file) => file.path)).toEqual([]);
  });

  it('holds for every import, type imports and re-exports included', () => {
    const broken = files.flatMap((file) =>
      importsOf(file).flatMap((specifier) => {
        const why = checkImport(file.path, specifier);
        return why ? [`${file.path}: ${why}`] : [];
      }),
    );
    expect(broken).toEqual([]);
  });

  it('would see what it forbids', () => {
    expect(checkImport('lib/theory/pitch.ts', '@/db/client')).toBe('lib/theory/ may not import db/client');
    expect(checkImport('lib/theory/pitch.ts', '../score/score')).toBe('lib/theory/ may not import lib/score/score');
    expect(checkImport('components/ui/button.tsx', '@/app/page')).toBe('components/ may not import app/page');
    expect(checkImport('lib/harmony/reading.ts', 'react')).toBe('lib/harmony/ may not use the package react');
    expect(checkImport('app/page.tsx', '@/db/client')).toBe('app/ may not import db/client');
    expect(checkImport('lib/harmony/edit.ts', '../theory/pitch')).toBeUndefined();
  });
});

function findPlaces(file: SourceFile, matches: (node: ts.Node) => boolean): string[] {
  const places: string[] = [];
  visitNodes(file.tree, (node) => {
    if (matches(node)) places.push(`${file.path}:${lineOf(file, node)}`);
  });
  return places;
}

function isProperty(node: ts.Node, object: string, property: string): boolean {
  return (
    ts.isPropertyAccessExpression(node) && ts.isIdentifier(node.expression) && node.expression.text === object && node.name.text === property
  );
}

function isClockOrChance(node: ts.Node): boolean {
  const isNow = ts.isNewExpression(node) && node.expression.getText() === 'Date' && (node.arguments?.length ?? 0) === 0;
  return isNow || isProperty(node, 'Date', 'now') || isProperty(node, 'Math', 'random') || isProperty(node, 'performance', 'now');
}

describe('the environment', () => {
  it('is read by lib/config.ts alone', () => {
    // Next itself says in NEXT_RUNTIME which of its two runtimes asks.
    const readers = new Set(['lib/config.ts', 'instrumentation.ts']);
    const places = files.filter((file) => !readers.has(file.path)).flatMap((file) => findPlaces(file, (node) => isProperty(node, 'process', 'env')));
    expect(places).toEqual([]);
  });

  it('reaches no pure layer: neither clock nor chance', () => {
    const pure = files.filter((file) => findLayer(file.path)?.pure);
    expect(pure.flatMap((file) => findPlaces(file, isClockOrChance))).toEqual([]);
  });
});

describe('size', () => {
  it('keeps files within 400 lines, components within 200', () => {
    const limitOf = (file: SourceFile) => (/^components\/.*\.tsx$/.test(file.path) ? 200 : 400);
    expect(files.filter((file) => file.lines > limitOf(file)).map((file) => `${file.path}: ${file.lines}`)).toEqual([]);
  });

  it('keeps every function within 80 lines, nine in ten within 40, the median within 10', () => {
    const functions = files.flatMap((file) => functionsOf(file).map((found) => ({ ...found, path: file.path })));
    expect(functions.filter(({ lines }) => lines > 80).map(({ path, line, lines }) => `${path}:${line} has ${lines} lines`)).toEqual([]);
    const sorted = functions.map(({ lines }) => lines).sort((a, b) => a - b);
    expect(sorted[Math.floor(sorted.length * 0.9)]).toBeLessThanOrEqual(40);
    expect(sorted[Math.floor(sorted.length * 0.5)]).toBeLessThanOrEqual(10);
  });
});

describe('comments', () => {
  it('switch no check off and put nothing off', () => {
    const forbidden = /eslint-disable|@ts-(ignore|nocheck|expect-error)|\b(TODO|FIXME|XXX)\b/;
    const places = [...files, ...readSourceFiles(['tests'])].filter((file) => file.path !== 'tests/unit/import-rule.test.ts' && forbidden.test(file.text));
    expect(places.map((file) => file.path)).toEqual([]);
  });
});
