import { XMLParser } from 'fast-xml-parser';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertReading, insertReadingContent } from '@/db/queries/reading-rows';
import type { Actor } from '@/lib/auth/actor';
import { unwrap } from '@/lib/result';
import { createAssignment } from '@/lib/workflows/create-assignment';
import { createCourse } from '@/lib/workflows/create-course';
import { cutExcerpt } from '@/lib/workflows/cut-excerpt';
import { downloadReading } from '@/lib/workflows/download-reading';
import { unsafeGetKey } from '@/lib/workflows/key-of-assignment';
import { acceptAlternative, setQuestions } from '@/lib/workflows/set-questions';
import { musicXml } from '../../support/small-score';
import { framedFrom, readingFrom } from '../../support/reading-notation';
import { type TestServices, openServices } from '../../support/services';
import { readyScore, someone } from '../library/library-world';

let services: TestServices;
let actor: Actor;
let excerptId: string;
let readingId: string;

/** Bars 2 and 3 of four: G7 and C, read in C. */
beforeAll(async () => {
  services = await openServices();
  const { deps } = services;
  actor = await someone(deps, 'instructor');
  const scoreId = await readyScore(deps, actor, { title: 'To take along' });
  ({ excerptId } = unwrap(await cutExcerpt(deps, actor, { scoreId, title: 'Two bars', purpose: 'To take along', firstBar: 1, lastBar: 2 })));
  readingId = deps.newId();
  const span = { startTick: 4, endTick: 12 };
  await insertReading(deps.db, { ...span, id: readingId, excerptId, departmentId: actor.departmentId, ownerId: actor.userId, kind: 'person', title: 'Mine', state: 'open', basedOn: null });
  const { labels, regions } = readingFrom('C: V7 I');
  const later = <T extends { readonly start: number; readonly end: number }>(one: T) => ({ ...one, start: one.start + 4, end: one.end + 4 });
  await insertReadingContent(deps.db, readingId, {
    start: 4,
    end: 12,
    labels: labels.map((label) => ({ ...later(label), id: deps.newId() })),
    regions: regions.map(later),
  });
});
afterAll(() => services.close());

async function download(form: 'musicxml' | 'csv' | 'json') {
  const file = unwrap(await downloadReading(services.deps, actor, { readingId, form }));
  return { ...file, text: new TextDecoder().decode(file.bytes) };
}

describe('downloadReading', () => {
  it('puts the labels into the uploaded file and leaves the rest as it was, ending them with the excerpt', async () => {
    const { text, fileName } = await download('musicxml');
    expect(fileName).toBe('Two bars, Mine.musicxml');
    expect(text.replace(/<harmony[\s\S]*?<\/harmony>/g, '')).toBe(musicXml({ title: 'To take along' }));
    // Read by fast-xml-parser: which bars hold which degrees. Source of the elements: W3C MusicXML 4.0, harmony, numeral.
    const parsed = new XMLParser().parse(text) as { 'score-partwise': { part: { measure: { harmony?: { numeral: { 'numeral-root': number }; kind: string } }[] } } };
    const found = parsed['score-partwise'].part.measure.map(({ harmony }) => harmony && [harmony.numeral['numeral-root'], harmony.kind]);
    expect(found).toEqual([undefined, [5, 'dominant'], [1, 'major'], [1, 'none']]);
  });

  it('writes what an assignment accepts beside its key as alternates', async () => {
    const { deps } = services;
    const course = unwrap(await createCourse(deps, actor, { title: 'Harmony', code: 'H 1', term: 'Autumn' }));
    const made = unwrap(await createAssignment(deps, actor, { courseId: course.courseId, title: 'Two bars', readingId, excerptId }));
    const chord = framedFrom('G: I');
    unwrap(await setQuestions(deps, actor, { assignmentId: made.assignmentId, questions: [{ startTick: 4, points: null }] }));
    unwrap(await acceptAlternative(deps, actor, { assignmentId: made.assignmentId, startTick: 4, chord }));
    const { readingId: keyId } = await unsafeGetKey(deps, made.assignmentId);
    const file = unwrap(await downloadReading(deps, actor, { readingId: keyId, form: 'musicxml' }));
    // Source: W3C MusicXML 4.0, harmony: alternate harmonies are elements of their own with type="alternate".
    const kinds = [...new TextDecoder().decode(file.bytes).matchAll(/<harmony[^>]*type="(\w+)"/g)].map(([, kind]) => kind);
    expect(kinds).toEqual(['explicit', 'alternate', 'explicit', 'explicit']);
  });

  it('writes a table of the labels', async () => {
    const { text, mediaType } = await download('csv');
    expect(mediaType).toContain('text/csv');
    const rows = text.split('\r\n').slice(1, 3).map((line) => line.split(',').map((cell) => cell.replaceAll('"', '')).slice(0, 5));
    expect(rows).toEqual([['2', '0', '4', 'C major', 'V7'], ['3', '0', '4', 'C major', 'I']]);
  });

  it('writes the report that the command line writes', async () => {
    const { labels } = JSON.parse((await download('json')).text) as { labels: { measure: number; numeral: string; root: string }[] };
    expect(labels).toMatchObject([{ measure: 1, numeral: 'V7', root: 'G' }, { measure: 2, numeral: 'I', root: 'C' }]);
  });

  it('knows nothing of another department’s', async () => {
    const stranger = await someone(services.deps, 'owner');
    expect(await downloadReading(services.deps, stranger, { readingId, form: 'csv' })).toMatchObject({ ok: false, error: { code: 'not_found' } });
  });
});
