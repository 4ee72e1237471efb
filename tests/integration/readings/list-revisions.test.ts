import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Actor } from '@/lib/auth/actor';
import { type EditResult, changeBetween, setNumeral } from '@/lib/harmony/edit';
import { rewind } from '@/lib/harmony/edit-merge';
import { mergeWithNext } from '@/lib/harmony/edit-spans';
import type { Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { editReading } from '@/lib/workflows/edit-reading';
import { listRevisions } from '@/lib/workflows/list-revisions';
import { readNews, readReading } from '@/lib/workflows/read-reading';
import { numeralsOf } from '../../support/reading-edits';
import type { TestServices } from '../../support/services';
import { type TwoEditors, addSharedReading, openTwoEditors } from './two-editors';

let services: TestServices;
let me: Actor;
let colleague: Actor;
let readingId: string;
let editors: TwoEditors;

beforeAll(async () => {
  editors = await openTwoEditors('History');
  ({ services, me, colleague } = editors);
});
afterAll(() => services.close());
beforeEach(async () => {
  readingId = await addSharedReading(editors);
});

const read = async () => unwrap(await readReading(services.deps, me, { readingId }));

async function edit(actor: Actor, words: string, make: (reading: Reading) => EditResult) {
  const { reading, version } = await read();
  const { change } = unwrap(make(reading));
  unwrap(await editReading(services.deps, actor, { readingId, editId: randomUUID(), baseVersion: version, words, change }));
}

const numeral = (text: string) => unwrap(parseNumeral(text, 'major'));

describe('the history of a reading', () => {
  it('tells who, when and what, the newest first', async () => {
    await edit(me, 'Wrote V7.', (r) => setNumeral(r, r.labels[1]!.id, numeral('V7')));
    await edit(colleague, 'Joined two labels.', (r) => mergeWithNext(r, r.labels[0]!.id));
    const { revisions, more } = unwrap(await listRevisions(services.deps, me, { readingId, before: 1_000 }));
    expect(more).toBe(false);
    expect(revisions.map((r) => [r.version, r.by, r.words, r.count])).toEqual([[2, colleague.name, 'Joined two labels.', 2], [1, me.name, 'Wrote V7.', 1]]);
    expect(revisions[1]!.changed[0]).toMatchObject({ before: { numeral: numeral('V') }, after: { numeral: numeral('V7') } });
    expect(revisions[0]!.changed.map((c) => c.after === null)).toContain(true);
  });

  it('comes a page at a time', async () => {
    for (let turn = 0; turn < 33; turn += 1) await edit(me, `Turn ${turn}.`, (r) => setNumeral(r, r.labels[0]!.id, numeral(turn % 2 ? 'I' : 'IV')));
    const first = unwrap(await listRevisions(services.deps, me, { readingId, before: 1_000 }));
    expect([first.revisions.length, first.more]).toEqual([30, true]);
    const rest = unwrap(await listRevisions(services.deps, me, { readingId, before: first.revisions.at(-1)!.version }));
    expect(rest.revisions.map((r) => r.version)).toEqual([3, 2, 1]);
    expect(rest.more).toBe(false);
  });

  it('brings any state back, as an edit like any other', async () => {
    const states = [numeralsOf((await read()).reading)];
    const keep = async () => states.push(numeralsOf((await read()).reading));
    await edit(me, 'a', (r) => setNumeral(r, r.labels[1]!.id, numeral('V65')));
    await keep();
    await edit(colleague, 'b', (r) => mergeWithNext(r, r.labels[0]!.id));
    await keep();
    await edit(me, 'c', (r) => setNumeral(r, r.labels[0]!.id, numeral('ii6')));
    await keep();
    for (const [version, state] of [...states.entries()].slice(0, -1).reverse()) {
      const now = await read();
      const since = unwrap(await readNews(services.deps, me, { readingId, since: version })).revisions;
      const then = rewind(now.reading, since.map((r) => r.change))!;
      expect(numeralsOf(then)).toBe(state);
      await edit(me, `Back to ${version}.`, (r) => ({ ok: true, value: { reading: then, change: changeBetween(r, then) } }));
      expect(numeralsOf((await read()).reading)).toBe(state);
    }
  });

  it('does not rewind over a gap', async () => {
    await edit(me, 'a', (r) => setNumeral(r, r.labels[1]!.id, numeral('V65')));
    await edit(me, 'c', (r) => setNumeral(r, r.labels[1]!.id, numeral('V7')));
    const { reading } = await read();
    const [first] = unwrap(await readNews(services.deps, me, { readingId, since: 0 })).revisions;
    expect(rewind(reading, [first!.change])).toBeNull();
  });
});
