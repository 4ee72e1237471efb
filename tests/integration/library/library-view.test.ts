import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertReading, insertReadingContent } from '@/db/queries/reading-rows';
import { type LibraryFilter, getLibraryFacets, listLibrary } from '@/db/queries/library';
import type { Actor } from '@/lib/auth/actor';
import { unwrap } from '@/lib/result';
import { cutExcerpt } from '@/lib/workflows/cut-excerpt';
import { readingFrom } from '../../support/reading-notation';
import { type TestServices, openServices } from '../../support/services';
import { addPerson } from '../../support/world';
import { readyScore, someone } from './library-world';

const ALL: LibraryFilter = {
  words: '',
  composer: null,
  key: null,
  state: null,
  uploadedBy: null,
  secondaryDiminished: false,
  sort: 'title',
  descending: false,
  page: 1,
};

let services: TestServices;
let actor: Actor;
let colleague: Actor;

/** An excerpt whose reading is written in the tests' notation. */
async function addReading(scoreId: string, purpose: string, notation: string, owner: Actor | null): Promise<void> {
  const { deps } = services;
  const { excerptId } = unwrap(await cutExcerpt(deps, actor, { scoreId, title: 'Cut', purpose, firstBar: 0, lastBar: 1 }));
  const reading = readingFrom(notation);
  const id = deps.newId();
  const row = { id, excerptId, departmentId: actor.departmentId, ownerId: owner?.userId ?? null, title: 'Written', state: 'open', startTick: reading.start, endTick: reading.end } as const;
  await insertReading(deps.db, { ...row, kind: owner ? 'person' : 'engine' });
  await insertReadingContent(deps.db, id, { ...reading, labels: reading.labels.map((label) => ({ ...label, id: deps.newId() })) });
}

beforeAll(async () => {
  services = await openServices();
  const { deps } = services;
  actor = await someone(deps, 'instructor');
  colleague = await addPerson(deps, actor.departmentId, 'assistant', 'colleague');
  const aubade = await readyScore(deps, actor, { title: 'Aubade', composer: 'Verrin' });
  const barcarolle = await readyScore(deps, colleague, { title: 'Barcarolle', composer: 'Oslet' });
  await readyScore(deps, actor, { title: '100% Chorale', composer: 'Verrin' });
  await addReading(aubade, 'Half-diminished seventh of the dominant', 'Eb: I viiø7/V V I', null);
  await addReading(barcarolle, 'A plain cadence', 'g: i V7 i', null);
  await addReading(barcarolle, 'Only the colleague knows', 'g: i vii°7/V V', colleague);
});
afterAll(() => services.close());

async function titles(filter: Partial<LibraryFilter>, as: Actor = actor): Promise<string[]> {
  const { rows } = await listLibrary(services.deps.db, as, { ...ALL, ...filter });
  return rows.map(({ title }) => title);
}

describe('listLibrary', () => {
  it('sorts by title and by composer, either way', async () => {
    expect(await titles({})).toEqual(['100% Chorale', 'Aubade', 'Barcarolle']);
    expect(await titles({ descending: true })).toEqual(['Barcarolle', 'Aubade', '100% Chorale']);
    expect((await titles({ sort: 'composer' }))[0]).toBe('Barcarolle');
  });

  it('finds words in titles, composers and the purposes of excerpts, all of them', async () => {
    expect(await titles({ words: 'verrin' })).toEqual(['100% Chorale', 'Aubade']);
    expect(await titles({ words: 'half-diminished aub' })).toEqual(['Aubade']);
    expect(await titles({ words: 'half-diminished barc' })).toEqual([]);
  });

  it('takes signs of the query language for themselves', async () => {
    expect(await titles({ words: '100%' })).toEqual(['100% Chorale']);
    expect(await titles({ words: '_ubade' })).toEqual([]);
  });

  it('narrows by composer, by who brought it in and by state', async () => {
    expect(await titles({ composer: 'Oslet' })).toEqual(['Barcarolle']);
    expect(await titles({ uploadedBy: colleague.userId })).toEqual(['Barcarolle']);
    expect(await titles({ state: 'uncut' })).toEqual(['100% Chorale']);
    expect(await titles({ state: 'refused' })).toEqual([]);
  });

  it('narrows by the key an excerpt begins in', async () => {
    expect(await titles({ key: { tonicFifths: -3, mode: 'major' } })).toEqual(['Aubade']);
    expect(await titles({ key: { tonicFifths: 1, mode: 'minor' } })).toEqual(['Barcarolle']);
    expect(await titles({ key: { tonicFifths: 1, mode: 'major' } })).toEqual([]);
  });

  it('finds secondary diminished sevenths, in a private reading for its owner alone', async () => {
    expect(await titles({ secondaryDiminished: true })).toEqual(['Aubade']);
    expect(await titles({ secondaryDiminished: true }, colleague)).toEqual(['Aubade', 'Barcarolle']);
  });

  it('shows another department nothing', async () => {
    const stranger = await someone(services.deps, 'owner');
    expect(await titles({}, stranger)).toEqual([]);
    expect(await getLibraryFacets(services.deps.db, stranger)).toEqual({ composers: [], uploaders: [], keys: [], total: 0 });
  });
});

describe('getLibraryFacets', () => {
  it('offers composers, people and opening keys that are there', async () => {
    const facets = await getLibraryFacets(services.deps.db, actor);
    expect(facets.composers).toEqual([{ composer: 'Oslet', n: 1 }, { composer: 'Verrin', n: 2 }]);
    expect(facets.uploaders.map(({ n }) => n).sort()).toEqual([1, 2]);
    expect(facets.keys).toEqual([{ tonicFifths: -3, mode: 'major', n: 1 }, { tonicFifths: 1, mode: 'minor', n: 1 }]);
    expect(facets.total).toBe(3);
  });
});
