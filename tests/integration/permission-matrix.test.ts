/**
 * Every action and route × every role, against the real workflows and the real database. The endpoints are found by
 * walking app/: one that is in no table of tests/integration/permissions/ fails this test. Expected values come from
 * the product's role table.
 */
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Endpoint, findEndpoint } from '@/lib/http/endpoint';
import type { Deps } from '@/lib/workflows/deps';
import { type TestServices, openServices } from '../support/services';
import { SECRET_TITLE, type World, createWorld } from '../support/world';
import { CASES } from './permissions/cases';
import { COLUMNS, type Case, type Column, visitorOf } from './permissions/matrix';

const APP = path.resolve(import.meta.dirname, '../../app');

/** Files whose exports are not made by lib/http, and why. */
const NOT_OURS: readonly string[] = [
  // next-auth's own routes: they only reach the sign-in workflows, which tests/integration/sign-in.test.ts tries.
  'api/auth/[...nextauth]/route.ts',
];

/** Endpoints that are not about anyone's things, and why. */
const OPEN: readonly string[] = [
  // Says whether the parts of the service answer; it reads no row.
  'health.read',
];

interface Found extends Endpoint {
  readonly file: string;
}

function filesNamed(names: RegExp): string[] {
  return readdirSync(APP, { recursive: true, encoding: 'utf8' }).filter((file) => names.test(file));
}

async function findEndpoints(): Promise<{ readonly endpoints: readonly Found[]; readonly foreign: readonly string[] }> {
  const endpoints: Found[] = [];
  const foreign: string[] = [];
  for (const file of filesNamed(/(?:^|\/)(?:actions|route)\.ts$/).filter((name) => !NOT_OURS.includes(name))) {
    const exported = (await import(path.join(APP, file))) as Record<string, unknown>;
    for (const [name, value] of Object.entries(exported)) {
      const endpoint = findEndpoint(value);
      if (endpoint) endpoints.push({ ...endpoint, file });
      else if (typeof value === 'function') foreign.push(`${file}: ${name}`);
    }
  }
  return { endpoints, foreign };
}

const { endpoints, foreign } = await findEndpoints();

/** `readings.edit (key)` is a case of `readings.edit`. */
function endpointOf(caseName: string): Found {
  const name = caseName.split(' (')[0];
  const endpoint = endpoints.find((found) => found.name === name);
  if (!endpoint) throw new Error(`the table has ${caseName}, and app/ has no such endpoint`);
  return endpoint;
}

describe('every action and route', () => {
  it('is made by lib/http', () => {
    expect(foreign).toEqual([]);
  });

  it('has a name of its own', () => {
    const names = endpoints.map((endpoint) => endpoint.name);
    expect(names.filter((name, at) => names.indexOf(name) !== at)).toEqual([]);
  });

  it('is in the matrix', () => {
    const tried = new Set(Object.keys(CASES).map((name) => name.split(' (')[0]));
    const missing = endpoints.filter(({ name }) => !tried.has(name) && !OPEN.includes(name));
    expect(missing.map(({ name, file }) => `${name} (app/${file}) needs a case in tests/integration/permissions/`)).toEqual([]);
  });
});

describe('every page behind the sign-in', () => {
  it('asks who is there', () => {
    const pages = filesNamed(/^\(app\)\/.*\/page\.tsx$/);
    expect(pages.length).toBeGreaterThan(0);
    const open = pages.filter((file) => !/\b(?:requireActor|getVisitor)\(/.test(readFileSync(path.join(APP, file), 'utf8')));
    expect(open).toEqual([]);
  });
});

class RolledBack extends Error {}

/** Tries in a transaction that leaves nothing behind, so that each cell meets the same world. */
async function inRolledBack<T>(deps: Deps, work: (deps: Deps) => Promise<T>): Promise<T> {
  const kept: { value?: T } = {};
  await deps.db
    .transaction(async (db) => {
      kept.value = await work({ ...deps, db });
      throw new RolledBack();
    })
    .catch((error: unknown) => {
      if (!(error instanceof RolledBack)) throw error;
    });
  return kept.value as T;
}

async function tryCell(deps: Deps, world: World, caseName: string, tried: Case, column: Column) {
  return inRolledBack(deps, async (inside) => {
    const input = await tried.input(world, inside, column);
    const result = await endpointOf(caseName).run(inside, visitorOf(world, column), input);
    if (!result.ok) return { outcome: result.error.code, text: JSON.stringify(result.error) };
    const text = result.value instanceof Response ? await result.value.text() : JSON.stringify(result.value);
    return { outcome: 'ok', text };
  });
}

describe('the permission matrix', () => {
  let services: TestServices;
  let world: World;
  beforeAll(async () => {
    services = await openServices();
    world = await createWorld(services.deps);
  });
  afterAll(() => services.close());

  for (const [caseName, tried] of Object.entries(CASES)) {
    it.each(COLUMNS)(`${caseName} as %s`, async (column) => {
      const { outcome, text } = await tryCell(services.deps, world, caseName, tried, column);
      expect(outcome, text.slice(0, 300)).toBe(tried.expected[column]);
      if (outcome === 'not_found' || outcome === 'signed_out') expect(text).not.toContain(SECRET_TITLE);
    });
  }
});
