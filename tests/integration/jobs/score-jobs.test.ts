import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { insertReading, unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { findScore } from '@/db/queries/scores';
import { jobs, readings } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { JOB_HANDLERS } from '@/lib/jobs/handlers';
import { enqueue } from '@/lib/jobs/queue';
import { runNextJob } from '@/lib/jobs/run-job';
import { unwrap } from '@/lib/result';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { uploadScore } from '@/lib/workflows/upload-score';
import { type TestServices, openServices } from '../../support/services';
import { MUSIC_BYTES, addDepartment, addExcerpt, addPerson } from '../../support/world';

let services: TestServices;
let instructor: Actor;
beforeAll(async () => {
  services = await openServices();
  const departmentId = await addDepartment(services.deps, 'A department');
  instructor = await addPerson(services.deps, departmentId, 'instructor', 'instructor');
});
afterAll(() => services.close());
beforeEach(async () => void (await services.deps.db.delete(jobs)));

async function runJobs(): Promise<void> {
  const worker = { id: 'w1', deps: services.deps, handlers: JOB_HANDLERS, running: new Set<string>() };
  while (await runNextJob(worker));
}

const WORDS = { title: '', composer: '', work: '', source: 'Written for the tests', rights: 'Public domain' };

/** Uploads, does the jobs, and gives the score's row. */
async function upload(fileName: string, bytes: Uint8Array | string, words = WORDS) {
  const file = new File([bytes as BlobPart], fileName);
  const { scoreId } = unwrap(await uploadScore(services.deps, instructor, { ...words, file }));
  await runJobs();
  const score = await findScore(services.deps.db, instructor, scoreId);
  if (!score) throw new Error('the score is not there');
  return score;
}

const withTitle = (title: string) => new TextDecoder().decode(MUSIC_BYTES).replace('<part-list>', `<movement-title>${title}</movement-title><part-list>`);

describe('read_score', () => {
  it('fills in what is in the file', async () => {
    const score = await upload('two-chords.musicxml', MUSIC_BYTES);
    expect(score).toMatchObject({ state: 'ready', title: 'two-chords', noteCount: 6, keyFifths: 0, refusal: null });
    expect(score.bars?.map((bar) => bar.number)).toEqual(['1', '2']);
  });

  it('takes the file’s own title where none was typed, and else keeps what was typed', async () => {
    expect((await upload('a.musicxml', withTitle('Hymn'))).title).toBe('Hymn');
    expect((await upload('b.musicxml', withTitle('Psalm'), { ...WORDS, title: 'My title' })).title).toBe('My title');
  });

  it('says of a broken file where it is broken', async () => {
    const broken = new TextDecoder().decode(MUSIC_BYTES).replace('</measure>', '</measur>');
    const score = await upload('broken.musicxml', broken);
    expect(score).toMatchObject({ state: 'refused', refusal: { code: 'xml_broken', line: broken.slice(0, broken.indexOf('</measur>')).split('\n').length } });
  });

  it('says of a file that is no score what it is', async () => {
    expect(await upload('list.xml', '<opus/>')).toMatchObject({ state: 'refused', refusal: { code: 'not_musicxml', element: 'opus' } });
  });

  it('says so when the file is gone from the store', async () => {
    const file = new File([withTitle('Gone')], 'gone.musicxml');
    const { scoreId } = unwrap(await uploadScore(services.deps, instructor, { ...WORDS, file }));
    const row = await findScore(services.deps.db, instructor, scoreId);
    await services.deps.storage.remove(row?.sha256 ?? '');
    await runJobs();
    expect(await findScore(services.deps.db, instructor, scoreId)).toMatchObject({ state: 'refused', refusal: { code: 'file_missing' } });
  });
});

describe('propose_reading', () => {
  async function proposing(scoreId: string): Promise<string> {
    const { db, newId } = services.deps;
    const id = newId();
    const excerptId = await addExcerpt(services.deps, instructor, scoreId);
    const { departmentId } = instructor;
    await insertReading(db, { id, excerptId, departmentId, ownerId: null, kind: 'engine', title: 'Proposal', state: 'proposing', startTick: 0, endTick: 8 });
    return id;
  }

  async function findReading(id: string) {
    return (await services.deps.db.select().from(readings)).find((reading) => reading.id === id);
  }

  it('fills a waiting reading with suggestions that tile the excerpt', async () => {
    const score = await upload('tonic-dominant.musicxml', withTitle('Tonic, dominant'));
    const readingId = await proposing(score.id);
    await enqueue(services.deps.db, 'propose_reading', { readingId }, { id: services.deps.newId(), now: services.deps.now() });
    await runJobs();
    expect((await findReading(readingId))?.state).toBe('open');
    const { labels } = await unsafeLoadReadingContent(services.deps.db, { id: readingId, startTick: 0, endTick: 8 });
    // C-E-G, then G-D-B in C major.
    expect(labels.map((label) => label.numeral && formatNumeral(label.numeral, label.key.mode))).toEqual(['I', 'V']);
    expect(labels.map(({ start, end, state }) => [start, end, state])).toEqual([[0, 4, 'suggested'], [4, 8, 'suggested']]);
  });

  it('is queued by reading the score for whatever waits for it', async () => {
    const file = new File([withTitle('Waited for')], 'waited-for.musicxml');
    const { scoreId } = unwrap(await uploadScore(services.deps, instructor, { ...WORDS, file }));
    const readingId = await proposing(scoreId);
    await runJobs();
    expect((await findReading(readingId))?.state).toBe('open');
  });

  it('fails what waits for a score that is refused', async () => {
    const file = new File(['<opus>2</opus>'], 'refused.xml');
    const { scoreId } = unwrap(await uploadScore(services.deps, instructor, { ...WORDS, file }));
    const readingId = await proposing(scoreId);
    await runJobs();
    expect((await findReading(readingId))?.state).toBe('failed');
  });
});
