import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findScore, findScoreStates } from '@/db/queries/scores';
import { jobs, scores } from '@/db/schema';
import { unwrap } from '@/lib/result';
import { sha256Of } from '@/lib/storage/object-store';
import { deleteScore, readScoreAgain, restoreScore } from '@/lib/workflows/change-score';
import { getScoreFile } from '@/lib/workflows/get-score-file';
import { uploadScore, uploadScoreInput } from '@/lib/workflows/upload-score';
import { bombMxl, musicXml, mxlOf } from '../../support/small-score';
import { type TestServices, openServices } from '../../support/services';
import { WORDS, fileOf, readyScore, someone, workOff } from './library-world';

let services: TestServices;
beforeAll(async () => void (services = await openServices()));
afterAll(() => services.close());

describe('uploadScore', () => {
  it('stores the file under its SHA-256 and queues its reading with the row', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const xml = musicXml({ title: 'Stored' });
    const { scoreId, existing } = unwrap(await uploadScore(deps, actor, { ...WORDS, file: fileOf(xml) }));
    const bytes = new TextEncoder().encode(xml);
    expect(existing).toBe(false);
    expect(await deps.storage.get(sha256Of(bytes))).toEqual(bytes);
    expect(await findScore(deps.db, actor, scoreId)).toMatchObject({ state: 'queued', title: 'piece', sha256: sha256Of(bytes), byteSize: bytes.byteLength });
    const queued = await deps.db.select({ payload: jobs.payload }).from(jobs).where(eq(jobs.kind, 'read_score'));
    expect(queued).toContainEqual({ payload: { scoreId } });
  });

  it('fills title, composer, bars and notes from the file once it is read', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'assistant');
    const scoreId = await readyScore(deps, actor, { title: 'Morning song', composer: 'A. N. Other', bars: 3, firstNumber: 5 });
    const score = await findScore(deps.db, actor, scoreId);
    expect(score).toMatchObject({ state: 'ready', title: 'Morning song', composer: 'A. N. Other', noteCount: 12, keyFifths: 0 });
    expect(score?.bars?.map(({ number }) => number)).toEqual(['5', '6', '7']);
  });

  it('keeps the words that a person typed', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const file = fileOf(musicXml({ title: 'The file’s own' }), 'typed.musicxml');
    const { scoreId } = unwrap(await uploadScore(deps, actor, { ...WORDS, title: 'Mine', composer: 'Somebody', file }));
    await workOff(deps);
    expect(await findScore(deps.db, actor, scoreId)).toMatchObject({ title: 'Mine', composer: 'Somebody', state: 'ready' });
  });

  it('tells of the score that holds the same file already, in the department only', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const first = unwrap(await uploadScore(deps, actor, { ...WORDS, title: 'First', file: fileOf(musicXml({ title: 'Twice' })) }));
    const again = unwrap(await uploadScore(deps, actor, { ...WORDS, title: 'Second', file: fileOf(musicXml({ title: 'Twice' })) }));
    expect(again).toEqual({ scoreId: first.scoreId, title: 'First', existing: true });
    const elsewhere = unwrap(await uploadScore(deps, await someone(deps, 'owner'), { ...WORDS, file: fileOf(musicXml({ title: 'Twice' })) }));
    expect(elsewhere.existing).toBe(false);
  });

  it.each([
    ['notes.txt', 'hello', 'bad_input', /notes\.txt.*\.musicxml/],
    ['empty.mxl', '', 'bad_input', /empty\.mxl.*is empty/],
    ['large.xml', 'x'.repeat(10 * 1024 * 1024 + 1), 'too_large', /large\.xml.*10 MB/],
  ])('refuses %s with its name and what to do, and adds nothing', async (name, content, code, message) => {
    const { deps } = services;
    const before = await deps.db.select({ id: scores.id }).from(scores);
    const answer = await uploadScore(deps, await someone(deps, 'instructor'), { ...WORDS, file: fileOf(content, name) });
    expect(answer).toMatchObject({ ok: false, error: { code } });
    expect(answer.ok ? '' : answer.error.message).toMatch(message);
    expect(await deps.db.select({ id: scores.id }).from(scores)).toHaveLength(before.length);
  });

  it('asks for a source and a rights statement', () => {
    const parsed = uploadScoreInput.safeParse({ ...WORDS, source: ' ', rights: '', file: fileOf('x') });
    expect(parsed.error?.issues.map(({ path }) => path[0])).toEqual(['source', 'rights']);
  });
});

describe('the reading of an uploaded file', () => {
  it.each([
    ['a compressed score', mxlOf(musicXml()), 'ready', null],
    ['a zip bomb', bombMxl(), 'refused', { code: 'zip_bomb' }],
    ['XML that breaks off', musicXml().slice(0, -30), 'refused', { code: 'xml_broken' }],
    ['an entity', `<?xml version="1.0"?><!DOCTYPE a [<!ENTITY b "c">]>${musicXml().split('\n').slice(1).join('')}`, 'refused', { code: 'xml_entities' }],
    ['something else', '<html><body>no music</body></html>', 'refused', { code: 'not_musicxml' }],
  ])('settles %s', async (_name, content, state, refusal) => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const { scoreId } = unwrap(await uploadScore(deps, actor, { ...WORDS, file: fileOf(content, 'some.mxl') }));
    await workOff(deps);
    const [seen] = await findScoreStates(deps.db, actor, [scoreId]);
    expect(seen).toMatchObject({ state });
    if (refusal) expect(seen?.refusal).toMatchObject(refusal);
    if (refusal) expect(seen?.refusal?.message).toMatch(/\w{3,}.*\.$/);
  });

  it('keeps a refused file and reads it again when asked', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const { scoreId } = unwrap(await uploadScore(deps, actor, { ...WORDS, file: fileOf('<nothing/>', 'refused.xml') }));
    await workOff(deps);
    unwrap(await readScoreAgain(deps, actor, { scoreId }));
    expect(await findScore(deps.db, actor, scoreId)).toMatchObject({ state: 'queued' });
    await workOff(deps);
    expect(await findScore(deps.db, actor, scoreId)).toMatchObject({ state: 'refused' });
    expect(new TextDecoder().decode(unwrap(await getScoreFile(deps, actor, { scoreId })).bytes)).toBe('<nothing/>');
  });
});

describe('deleteScore', () => {
  it('takes a score out of the library, and restoreScore brings it back', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const scoreId = await readyScore(deps, actor, { title: 'Gone and back' });
    unwrap(await deleteScore(deps, actor, { scoreId }));
    expect(await findScore(deps.db, actor, scoreId)).toBeNull();
    unwrap(await restoreScore(deps, actor, { scoreId }));
    expect(await findScore(deps.db, actor, scoreId)).toMatchObject({ title: 'Gone and back' });
  });

  it('does not bring back a file that was uploaded again meanwhile', async () => {
    const { deps } = services;
    const actor = await someone(deps, 'instructor');
    const scoreId = await readyScore(deps, actor, { title: 'Replaced' });
    unwrap(await deleteScore(deps, actor, { scoreId }));
    await readyScore(deps, actor, { title: 'Replaced' });
    expect(await restoreScore(deps, actor, { scoreId })).toMatchObject({ ok: false, error: { code: 'already_there' } });
  });
});
