import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findExcerpt, listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import type { Actor } from '@/lib/auth/actor';
import { validateReading } from '@/lib/harmony/validate';
import { unwrap } from '@/lib/result';
import { formatKey } from '@/lib/theory/key';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { deleteExcerpt, restoreExcerpt } from '@/lib/workflows/change-excerpt';
import { deleteScore } from '@/lib/workflows/change-score';
import { cutExcerpt } from '@/lib/workflows/cut-excerpt';
import { importReading } from '@/lib/workflows/import-reading';
import { makeAnswerKey, startReading } from '@/lib/workflows/start-reading';
import { readingOf } from '@/lib/workflows/stored-reading';
import { uploadScore } from '@/lib/workflows/upload-score';
import { musicXml } from '../../support/small-score';
import { type TestServices, openServices } from '../../support/services';
import { addPerson } from '../../support/world';
import { WORDS, fileOf, readyScore, someone, workOff } from './library-world';

let services: TestServices;
/** Someone with a score of four bars that has been read: most tests cut from it. */
let shared: { readonly actor: Actor; readonly scoreId: string };
beforeAll(async () => {
  services = await openServices();
  const actor = await someone(services.deps, 'instructor');
  shared = { actor, scoreId: await readyScore(services.deps, actor) };
});
afterAll(() => services.close());

const CUT = { title: 'Two bars', purpose: 'Tonic and dominant', firstBar: 1, lastBar: 2 };

/** An excerpt of the second and third bar. */
async function cutSomething({ actor, scoreId } = shared) {
  const { deps } = services;
  const { excerptId } = unwrap(await cutExcerpt(deps, actor, { ...CUT, scoreId }));
  return { deps, actor, scoreId, excerptId };
}

async function findProposal({ deps, actor, excerptId }: Awaited<ReturnType<typeof cutSomething>>) {
  const readings = await listReadingsOfExcerpts(deps.db, actor, [excerptId]);
  return readings.find(({ kind }) => kind === 'engine');
}

describe('cutExcerpt', () => {
  it('keeps the bars with their ticks', async () => {
    const { deps, actor, excerptId } = await cutSomething();
    // Common practice, no source: a bar of 4/4 is four quarters, and this file's grid is one tick a quarter.
    expect(await findExcerpt(deps.db, actor, excerptId)).toMatchObject({ ...CUT, startTick: 4, endTick: 12, ticksPerQuarter: 1 });
  });

  it('starts a proposal that says it is being worked out, until the job has filled it', async () => {
    const cut = await cutSomething();
    expect(await findProposal(cut)).toMatchObject({ state: 'proposing', labelCount: 0 });
    await workOff(cut.deps);
    const filled = await findProposal(cut);
    expect(filled?.state).toBe('open');
    const stored = await unsafeLoadReadingContent(cut.deps.db, { id: filled?.id ?? '', startTick: 4, endTick: 12 });
    expect(validateReading(readingOf(stored))).toEqual([]);
    expect(stored.labels.every(({ state }) => state === 'suggested')).toBe(true);
    // Common practice, no source: G-D-F-B in C is V7 and C-E-G-C is I.
    expect(stored.labels.map(({ numeral }) => numeral?.degree.step)).toEqual([5, 1]);
  });

  it.each([
    [{ firstBar: 2, lastBar: 1 }, 'lastBar'],
    [{ firstBar: 0, lastBar: 4 }, 'lastBar'],
    [{ firstBar: 9, lastBar: 9 }, 'firstBar'],
  ])('refuses the bars %o and names the field', async (bars, field) => {
    const { actor, scoreId } = shared;
    const answer = await cutExcerpt(services.deps, actor, { ...CUT, ...bars, scoreId });
    expect(answer).toMatchObject({ ok: false, error: { code: 'bad_input', fields: { [field]: expect.any(String) } } });
  });

  it('waits until the score has been read', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const { scoreId } = unwrap(await uploadScore(deps, actor, { ...WORDS, file: fileOf(musicXml({ title: 'Unread' })) }));
    expect(await cutExcerpt(deps, actor, { ...CUT, scoreId })).toMatchObject({ ok: false, error: { code: 'not_ready' } });
    await workOff(deps);
  });

  it('finds no score of another department', async () => {
    const { deps, scoreId } = await cutSomething();
    const stranger = await someone(deps, 'owner');
    expect(await cutExcerpt(deps, stranger, { ...CUT, scoreId })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});

describe('startReading', () => {
  it('copies the proposal as suggestions into a reading of one’s own', async () => {
    const cut = await cutSomething();
    const { deps, actor, excerptId } = cut;
    expect(await startReading(deps, actor, { excerptId })).toMatchObject({ ok: false, error: { code: 'not_ready' } });
    await workOff(deps);
    const proposal = await findProposal(cut);
    const { readingId } = unwrap(await startReading(deps, actor, { excerptId }));
    const span = { startTick: 4, endTick: 12 };
    const from = await unsafeLoadReadingContent(deps.db, { id: proposal?.id ?? '', ...span });
    const copy = await unsafeLoadReadingContent(deps.db, { id: readingId, ...span });
    expect(copy.labels.map(({ numeral, start, end, others }) => ({ numeral, start, end, others }))).toEqual(
      from.labels.map(({ numeral, start, end, others }) => ({ numeral, start, end, others })),
    );
    expect(new Set([...from.labels, ...copy.labels].map(({ id }) => id)).size).toBe(from.labels.length * 2);
    expect(copy.regions).toEqual(from.regions);
  });

  it('stays private: a colleague sees the proposal and not the reading', async () => {
    const { deps, actor, excerptId } = await cutSomething();
    await workOff(deps);
    const { readingId } = unwrap(await startReading(deps, actor, { excerptId }));
    const colleague = await addPerson(deps, actor.departmentId, 'assistant', 'colleague');
    const seen = await listReadingsOfExcerpts(deps.db, colleague, [excerptId]);
    expect(seen.map(({ kind }) => kind)).toEqual(['engine']);
    expect(await startReading(deps, colleague, { excerptId, basedOn: readingId })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});

describe('importReading', () => {
  /** An excerpt of bars 2–3 of a score that has numerals as lyrics. */
  async function excerptWithLyrics(lyrics: readonly string[]) {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const scoreId = await readyScore(deps, actor, { title: `Sung ${lyrics.join(' ')}`, lyrics });
    const { excerptId } = unwrap(await cutExcerpt(deps, actor, { ...CUT, firstBar: 1, lastBar: 2, scoreId }));
    return { deps, actor, excerptId };
  }

  it('makes a private reading of the labels that the file holds in these bars', async () => {
    const { deps, actor, excerptId } = await excerptWithLyrics(['I', 'G: I', 'C: I', 'V7']);
    const { readingId } = unwrap(await importReading(deps, actor, { excerptId, source: 'lyrics' }));
    const { labels, regions } = await unsafeLoadReadingContent(deps.db, { id: readingId, startTick: 4, endTick: 12 });
    const named = labels.map(({ start, end, key, numeral, state }) => [start, end, formatKey(key), numeral && formatNumeral(numeral, key.mode), state]);
    expect(named).toEqual([[4, 8, 'G major', 'I', 'accepted'], [8, 12, 'C major', 'I', 'accepted']]);
    expect(regions.map(({ start, end, key }) => [start, end, formatKey(key)])).toEqual([[4, 8, 'G major'], [8, 12, 'C major']]);
    const colleague = await addPerson(deps, actor.departmentId, 'assistant', 'colleague');
    expect((await listReadingsOfExcerpts(deps.db, colleague, [excerptId])).map(({ id }) => id)).not.toContain(readingId);
  });

  it('says when the bars hold nothing of the kind', async () => {
    const { deps, actor, excerptId } = await excerptWithLyrics(['I', '', '', 'V7']);
    for (const source of ['harmony', 'lyrics'] as const) {
      expect(await importReading(deps, actor, { excerptId, source })).toMatchObject({ ok: false, error: { code: 'bad_input' } });
    }
  });
});

describe('makeAnswerKey', () => {
  it('copies a reading as it stands', async () => {
    const { deps, actor, excerptId } = await cutSomething();
    await workOff(deps);
    const own = unwrap(await startReading(deps, actor, { excerptId }));
    const key = unwrap(await makeAnswerKey(deps, actor, { excerptId, basedOn: own.readingId, title: 'Key' }));
    const readings = await listReadingsOfExcerpts(deps.db, actor, [excerptId]);
    expect(readings.find(({ id }) => id === key.readingId)).toMatchObject({ kind: 'key', title: 'Key', ownerId: actor.userId, labelCount: 2 });
  });
});

describe('deleting what is in use', () => {
  it('keeps a score that excerpts were cut from, and says so', async () => {
    const actor = await someone(services.deps, 'instructor');
    const { deps, scoreId, excerptId } = await cutSomething({ actor, scoreId: await readyScore(services.deps, actor) });
    const refused = await deleteScore(deps, actor, { scoreId });
    expect(refused).toMatchObject({ ok: false, error: { code: 'in_use', message: expect.stringContaining('One excerpt') } });
    unwrap(await deleteExcerpt(deps, actor, { excerptId }));
    unwrap(await deleteScore(deps, actor, { scoreId }));
    expect(await restoreExcerpt(deps, actor, { excerptId })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});
