import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { labels, readings, remarks, revisions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { type EditResult, acceptLabels, edited, findTileFaults, invertChange, markTone, setNumeral } from '@/lib/harmony/edit';
import { changeKeyFrom } from '@/lib/harmony/edit-keys';
import { mergeWithNext, splitLabel } from '@/lib/harmony/edit-spans';
import type { Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { parseKey } from '@/lib/theory/key';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { editReading } from '@/lib/workflows/edit-reading';
import { readNews, readReading } from '@/lib/workflows/read-reading';
import { addRemark, listRemarks } from '@/lib/workflows/remarks';
import { numeralsOf } from '../../support/reading-edits';
import type { TestServices } from '../../support/services';
import { addReading } from '../../support/world';
import { type TwoEditors, addSharedReading, openTwoEditors } from './two-editors';

let services: TestServices;
let me: Actor;
let colleague: Actor;
let excerptId: string;
let readingId: string;
let editors: TwoEditors;

beforeAll(async () => {
  editors = await openTwoEditors('Edits');
  ({ services, me, colleague, excerptId } = editors);
});
afterAll(() => services.close());
beforeEach(async () => {
  readingId = await addSharedReading(editors);
});

const numeral = (text: string) => unwrap(parseNumeral(text, 'major'));
const read = async (actor = me) => unwrap(await readReading(services.deps, actor, { readingId }));

interface Send {
  readonly actor?: Actor;
  readonly editId?: string;
  readonly baseVersion: number;
}

function send(result: EditResult, { actor = me, editId = randomUUID(), baseVersion }: Send) {
  const { change } = unwrap(result);
  return editReading(services.deps, actor, { readingId, editId, baseVersion, words: 'A trial.', change });
}

async function edit(make: (reading: Reading) => EditResult, actor = me) {
  const { reading, version } = await read(actor);
  return unwrap(await send(make(reading), { actor, baseVersion: version }));
}

describe('editReading', () => {
  it('saves the change, the next version and a revision with both sides', async () => {
    const news = await edit((r) => setNumeral(r, r.labels[1]!.id, numeral('V7')));
    expect(news).toMatchObject({ version: 1, revisions: [{ version: 1, by: me.name, words: 'A trial.' }] });
    const { reading, version } = await read();
    expect([numeralsOf(reading), version]).toEqual(['C: I V7', 1]);
    const rows = await services.deps.db.select().from(revisions).where(eq(revisions.readingId, readingId));
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ version: 1, authorId: me.userId, before: { labels: [{ numeral: { quality: 'major' } }] }, after: { labels: [{ numeral: { quality: 'dominant-seventh' } }] } });
  });

  it('keeps the columns that passage search asks in step with the numeral', async () => {
    await edit((r) => setNumeral(r, r.labels[1]!.id, numeral('viio7/V')));
    const rows = await services.deps.db.select().from(labels).where(and(eq(labels.readingId, readingId), eq(labels.position, 1)));
    expect(rows[0]).toMatchObject({ quality: 'diminished-seventh', degreeStep: 7, appliedStep: 5, numeralText: 'vii°7/V' });
  });

  it('does an edit once, however often it is sent', async () => {
    const { reading } = await read();
    const result = setNumeral(reading, reading.labels[0]!.id, numeral('I6'));
    const editId = randomUUID();
    const first = unwrap(await send(result, { editId, baseVersion: 0 }));
    const again = unwrap(await send(result, { editId, baseVersion: 0 }));
    expect(again).toEqual(first);
    expect((await read()).version).toBe(1);
  });

  it('does an edit once when it is sent twice at the same time', async () => {
    const { reading } = await read();
    const result = setNumeral(reading, reading.labels[0]!.id, numeral('I6'));
    const editId = randomUUID();
    const answers = await Promise.all([1, 2, 3].map(() => send(result, { editId, baseVersion: 0 })));
    expect(answers.map((a) => a.ok && a.value.version)).toEqual([1, 1, 1]);
    expect(await services.deps.db.select().from(revisions).where(eq(revisions.readingId, readingId))).toHaveLength(1);
  });

  it('puts edits of different labels together and tells the second what it missed', async () => {
    const { reading } = await read();
    unwrap(await send(setNumeral(reading, reading.labels[0]!.id, numeral('I6')), { actor: colleague, baseVersion: 0 }));
    const news = unwrap(await send(setNumeral(reading, reading.labels[1]!.id, numeral('V7')), { baseVersion: 0 }));
    expect(news.version).toBe(2);
    expect(news.revisions.map((r) => [r.version, r.by])).toEqual([[1, colleague.name], [2, me.name]]);
    expect(numeralsOf((await read()).reading)).toBe('C: I6 V7');
  });

  it('is a version conflict, and changes nothing, where the label has changed meanwhile', async () => {
    const { reading } = await read();
    unwrap(await send(setNumeral(reading, reading.labels[0]!.id, numeral('I6')), { baseVersion: 0 }));
    const second = await send(setNumeral(reading, reading.labels[0]!.id, numeral('vi')), { baseVersion: 0 });
    expect(second).toMatchObject({ ok: false, error: { code: 'version_conflict' } });
    expect(await read()).toMatchObject({ version: 1 });
    expect(numeralsOf((await read()).reading)).toBe('C: I6 V');
  });

  it('lets one of two edits of a label through when both come at once', async () => {
    const { reading } = await read();
    const answers = await Promise.all(['I6', 'vi', 'IV'].map((text) => send(setNumeral(reading, reading.labels[0]!.id, numeral(text)), { baseVersion: 0 })));
    expect(answers.filter((a) => a.ok)).toHaveLength(1);
    expect((await read()).version).toBe(1);
  });

  it('splits, joins and numbers labels in time order', async () => {
    await edit((r) => splitLabel(r, r.labels[0]!.id, 2, randomUUID()));
    const stored = await services.deps.db.select({ at: labels.startTick, position: labels.position }).from(labels).where(eq(labels.readingId, readingId)).orderBy(labels.startTick);
    expect(stored).toEqual([{ at: 0, position: 0 }, { at: 2, position: 1 }, { at: 4, position: 2 }]);
    await edit((r) => mergeWithNext(r, r.labels[1]!.id));
    const { reading } = await read();
    expect(findTileFaults(reading)).toEqual([]);
    expect(reading.labels.map((l) => [l.start, l.end])).toEqual([[0, 2], [2, 8]]);
  });

  it('changes a key with its labels', async () => {
    await edit((r) => changeKeyFrom(r, 4, unwrap(parseKey('G major')), 'sound'));
    expect(numeralsOf((await read()).reading)).toBe('C: I G: I');
  });

  it('undone, leaves the reading as it was, with its remarks on their labels', async () => {
    const start = (await read()).reading;
    const second = start.labels[1]!.id;
    unwrap(await addRemark(services.deps, me, { readingId, body: 'Why not V7?', labelId: second, barIndex: 1, threadId: null }));
    const joined = mergeWithNext(start, start.labels[0]!.id);
    unwrap(await send(joined, { baseVersion: 0 }));
    expect(unwrap(await listRemarks(services.deps, me, { readingId })).remarks[0]).toMatchObject({ labelId: null, barIndex: 1 });
    const undo = invertChange(unwrap(joined).change);
    unwrap(await editReading(services.deps, me, { readingId, editId: randomUUID(), baseVersion: 1, words: 'Undone.', change: undo }));
    expect((await read()).reading).toEqual(start);
    expect(unwrap(await listRemarks(services.deps, me, { readingId })).remarks[0]).toMatchObject({ labelId: second });
  });

  it('is settled when nothing is open any more, and open again after', async () => {
    const state = async () => (await services.deps.db.select({ state: readings.state }).from(readings).where(eq(readings.id, readingId)))[0]?.state;
    await services.deps.db.update(labels).set({ state: 'suggested', certainty: 0.5 }).where(eq(labels.readingId, readingId));
    await edit((r) => acceptLabels(r, [r.labels[0]!.id]));
    expect(await state()).toBe('open');
    await edit((r) => acceptLabels(r, [r.labels[1]!.id]));
    expect(await state()).toBe('settled');
    await edit((r) => setNumeral(r, r.labels[1]!.id, null));
    expect(await state()).toBe('open');
  });

  it('never writes over a label of another reading', async () => {
    const other = await addReading(services.deps, me.departmentId, excerptId, { ownerId: me.userId, kind: 'person' });
    const foreign = (await unsafeLoadReadingContent(services.deps.db, { id: other, startTick: 0, endTick: 8 })).labels[0]!;
    const { reading } = await read();
    const taken = reading.labels[0]!;
    const change = { labels: { before: [taken], after: [{ ...taken, id: foreign.id }] }, regions: { before: [], after: [] } };
    const answer = await editReading(services.deps, me, { readingId, editId: randomUUID(), baseVersion: 0, words: '', change });
    expect(answer).toMatchObject({ ok: false, error: { code: 'bad_input' } });
    expect((await unsafeLoadReadingContent(services.deps.db, { id: other, startTick: 0, endTick: 8 })).labels[0]).toEqual(foreign);
    expect((await read()).version).toBe(0);
  });
});

describe('readNews', () => {
  it('tells what was saved after a version, in order', async () => {
    await edit((r) => setNumeral(r, r.labels[0]!.id, numeral('I6')));
    await edit((r) => setNumeral(r, r.labels[1]!.id, numeral('V7')), colleague);
    const news = unwrap(await readNews(services.deps, me, { readingId, since: 1 }));
    expect(news).toMatchObject({ version: 2, revisions: [{ version: 2, by: colleague.name }] });
    expect(unwrap(await readNews(services.deps, me, { readingId, since: 2 })).revisions).toEqual([]);
  });
});

describe('what a person says of a label beside its numeral', () => {
  it('is kept: kinds of notes left over, and that it is a pivot', async () => {
    await edit((r) => markTone(r, r.labels[0]!.id, 7, 'suspension'));
    const pivot = (r: Reading): EditResult => edited(r, { ...r, labels: r.labels.map((l, i) => (i === 0 ? { ...l, pivot: true } : l)) });
    await edit(pivot);
    expect((await read()).reading.labels[0]).toMatchObject({ tones: [{ noteId: 7, kind: 'suspension' }], pivot: true });
    await edit((r) => markTone(r, r.labels[0]!.id, 7, null));
    const [first] = (await read()).reading.labels;
    expect([first!.tones, first!.pivot]).toEqual([undefined, true]);
  });
});

describe('remarks', () => {
  const remark = (body: string, more = {}) => ({ readingId, body, labelId: null, barIndex: 0, threadId: null, ...more });

  it('answer in the thread’s own place', async () => {
    const [head] = unwrap(await addRemark(services.deps, me, remark('Is this V?'))).remarks;
    const { remarks: all } = unwrap(await addRemark(services.deps, colleague, remark('It is.', { threadId: head!.id, barIndex: null })));
    expect(all.map((r) => [r.by, r.threadId, r.barIndex])).toEqual([[me.name, null, 0], [colleague.name, head!.id, 0]]);
  });

  it('stand in the order they were written, within one millisecond too', async () => {
    const still = { ...services.deps, now: () => new Date('2026-03-01T09:00:00.000Z') };
    const words = ['one', 'two', 'three', 'four', 'five', 'six'];
    for (const word of words) unwrap(await addRemark(still, me, remark(word)));
    expect(unwrap(await listRemarks(still, me, { readingId })).remarks.map((r) => r.body)).toEqual(words);
  });

  it('refuse a thread of another reading', async () => {
    const other = await addReading(services.deps, me.departmentId, excerptId, { ownerId: me.userId, kind: 'person' });
    const [head] = unwrap(await addRemark(services.deps, me, { ...remark('Elsewhere'), readingId: other })).remarks;
    expect(await addRemark(services.deps, me, remark('Here', { threadId: head!.id }))).toMatchObject({ ok: false, error: { code: 'not_found' } });
    expect(await services.deps.db.select().from(remarks).where(eq(remarks.readingId, readingId))).toEqual([]);
  });
});
