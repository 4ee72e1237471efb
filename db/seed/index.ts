/** Fills the demo: run it as often as you like, it adds what is missing and changes nothing that is there. */
import { and, count, eq } from 'drizzle-orm';
import { unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import { readings, scores } from '@/db/schema';
import { type Deps, createDeps } from '@/lib/workflows/deps';
import { addRemark } from '@/lib/workflows/remarks';
import { actorOf, must } from './actors';
import { seedHymnAssignment, seedOtherAssignments, seedStaircaseAssignment } from './assignments';
import { type SeededExcerpt, seedOwnReading, seedPiece } from './library';
import { DEMO_PIECES } from './music';
import { DEPARTMENT, seedPeople } from './people';
import { acceptSome, shareReading, startOwn } from './readings';

async function seed(): Promise<void> {
  const deps = createDeps();
  await seedPeople(deps);
  if (await hasDemoScores(deps)) return;
  await seedWork(deps);
}

/** Also when somebody has deleted them since: what people took out is not put back. */
async function hasDemoScores(deps: Deps): Promise<boolean> {
  const own = and(eq(scores.departmentId, DEPARTMENT.id), eq(scores.source, DEMO_PIECES.eveningHymn.source));
  const [row] = await deps.db.select({ n: count() }).from(scores).where(own);
  return (row?.n ?? 0) > 0;
}

/** Scores, excerpts, readings in several states, remarks, assignments. */
async function seedWork(deps: Deps): Promise<void> {
  const [hymn, staircase, minuet, song, prelude] = [
    await seedPiece(deps, 'eveningHymn'),
    await seedPiece(deps, 'staircase'),
    await seedPiece(deps, 'minuet'),
    await seedPiece(deps, 'song'),
    await seedPiece(deps, 'prelude'),
  ];
  await seedPiece(deps, 'romance');
  const hymnReading = await seedOwnReading(deps, 't.wrenfield', hymn);
  const staircaseReading = await seedOwnReading(deps, 't.wrenfield', staircase);
  const songReading = await seedOwnReading(deps, 'b.ollershaw', song);
  const preludeReading = await seedOwnReading(deps, 'i.rookhope', prelude);
  await seedDiscussion(deps, minuet);
  await acceptSome(deps, 't.wrenfield', await startOwn(deps, 't.wrenfield', prelude), 0.4);
  await seedStaircaseAssignment(deps, staircase, staircaseReading);
  await seedHymnAssignment(deps, hymn, hymnReading);
  await seedOtherAssignments(deps, { excerpt: prelude, readingId: preludeReading }, { excerpt: song, readingId: songReading });
}

/** Two colleagues argue a doubtful spot of the minuet. */
async function seedDiscussion(deps: Deps, minuet: SeededExcerpt): Promise<void> {
  const readingId = await seedOwnReading(deps, 'i.rookhope', minuet);
  await shareReading(deps, readingId, 'edit');
  const [span] = await deps.db.select({ startTick: readings.startTick, endTick: readings.endTick }).from(readings).where(eq(readings.id, readingId));
  const content = await unsafeLoadReadingContent(deps.db, { id: readingId, startTick: span?.startTick ?? 0, endTick: span?.endTick ?? 0 });
  const [sixth, neapolitan] = [content.labels[18], content.labels[12]];
  if (!sixth || !neapolitan) throw new Error('the minuet’s reading is shorter than expected');
  const say = (mailbox: string, body: string, labelId: string, threadId: string | null) =>
    addRemark(deps, actorOf(mailbox), { readingId, body, labelId, barIndex: null, threadId }).then(must);
  const { remarks } = await say('t.wrenfield', 'Would you print the six-four after this one, or go straight to V and let the fifths stand?', sixth.id, null);
  await say('i.rookhope', 'The six-four: F♯ and A♭ open to the octave G, and nobody hears fifths.', sixth.id, remarks[0]?.id ?? null);
  await say('b.ollershaw', 'First-years call this ii6. Worth a hint on the worksheet: D♭, not D.', neapolitan.id, null);
}

seed().then(
  () => process.exit(0),
  (error: unknown) => {
    console.error(error);
    process.exit(1);
  },
);
