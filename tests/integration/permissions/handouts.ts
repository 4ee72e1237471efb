import { handoutPrints } from '@/db/schema';
import { sha256Of } from '@/lib/storage/object-store';
import type { Deps } from '@/lib/workflows/deps';
import { MUSIC_BYTES, type World } from '../../support/world';
import { type Case, type Cases, STAFF, may } from './matrix';

const TEXTS = { title: 'Worksheet', byline: '', course: '', instructions: '', source: '' };
const OPTIONS = { ...TEXTS, kind: 'worksheet', paper: 'A4', staffSize: 'normal', keysGiven: true, asked: 'all', chosen: [] } as const;

const prints = (which: (world: World) => string, courseId: (world: World) => string | null = () => null): Case['input'] => (world) => ({
  ...OPTIONS,
  readingId: which(world),
  courseId: courseId(world),
});

/** A print that the instructor ordered of their private reading. */
async function ordered(world: World, deps: Deps) {
  const id = deps.newId();
  await deps.db.insert(handoutPrints).values({
    id,
    departmentId: world.departmentId,
    readingId: world.privateReadingId,
    readingVersion: 0,
    requestedBy: world.instructor.userId,
    options: OPTIONS,
    orderSha256: '0'.repeat(64),
    state: 'queued',
    pdfSha256: sha256Of(MUSIC_BYTES),
  });
  return { printId: id };
}

export const handoutCases: Cases = {
  'handouts.print': { input: prints((world) => world.engineReadingId), expected: STAFF },
  'handouts.print (private)': { input: prints((world) => world.privateReadingId), expected: may('instructor') },
  'handouts.print (for a course)': {
    input: prints((world) => world.sharedReadingId, (world) => world.courseId),
    expected: may('assistant', 'instructor', 'owner'),
  },
  'handouts.progress': { input: ordered, expected: may('instructor') },
  'handouts.file': { input: ordered, expected: may('instructor') },
};
