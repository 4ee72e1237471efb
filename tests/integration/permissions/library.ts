import { eq } from 'drizzle-orm';
import { assignments, excerpts, readings, scores } from '@/db/schema';
import type { Deps } from '@/lib/workflows/deps';
import { MUSIC_BYTES, type World } from '../../support/world';
import { ANY_STAFF, type Cases, STAFF, may } from './matrix';

const WORDS = { title: 'Two chords', composer: 'Nobody', work: '', source: 'The tests', rights: 'Public domain' };

/** Who brought it in, and whoever runs the department. */
const BRINGER = may('instructor', 'owner');

const theScore = (world: World) => ({ scoreId: world.scoreId });
const theExcerpt = (world: World) => ({ excerptId: world.excerptId });

async function changeScoreRow(world: World, deps: Deps, columns: Partial<typeof scores.$inferInsert>) {
  await deps.db.update(scores).set(columns).where(eq(scores.id, world.scoreId));
  return theScore(world);
}

async function changeExcerptRow(world: World, deps: Deps, columns: Partial<typeof excerpts.$inferInsert>) {
  await deps.db.update(excerpts).set(columns).where(eq(excerpts.id, world.excerptId));
  return theExcerpt(world);
}

async function withoutAssignments(world: World, deps: Deps) {
  await deps.db.update(assignments).set({ deletedAt: deps.now() }).where(eq(assignments.excerptId, world.excerptId));
  return theExcerpt(world);
}

export const library: Cases = {
  'scores.upload': { input: () => ({ ...WORDS, file: new File([MUSIC_BYTES], 'two.musicxml') }), expected: ANY_STAFF },
  'scores.states': { input: (world) => ({ ids: world.scoreId }), expected: ANY_STAFF },
  'scores.file': { input: theScore, expected: STAFF },
  'scores.change': { input: (world) => ({ ...WORDS, scoreId: world.scoreId }), expected: BRINGER },
  'scores.delete': {
    input: async (world, deps) => {
      await changeExcerptRow(world, deps, { deletedAt: deps.now() });
      return theScore(world);
    },
    expected: BRINGER,
  },
  'scores.restore': { input: (world, deps) => changeScoreRow(world, deps, { deletedAt: deps.now() }), expected: BRINGER },
  'scores.read_again': { input: (world, deps) => changeScoreRow(world, deps, { state: 'refused' }), expected: STAFF },
  'excerpts.cut': { input: (world) => ({ scoreId: world.scoreId, title: 'A bar', firstBar: 0, lastBar: 0 }), expected: STAFF },
  'excerpts.readings': { input: theExcerpt, expected: ANY_STAFF },
  'excerpts.change': { input: (world) => ({ excerptId: world.excerptId, title: 'Renamed' }), expected: BRINGER },
  'excerpts.delete': { input: withoutAssignments, expected: BRINGER },
  'excerpts.restore': { input: (world, deps) => changeExcerptRow(world, deps, { deletedAt: deps.now() }), expected: BRINGER },
  'excerpts.propose_again': {
    input: async (world, deps) => {
      await deps.db.update(readings).set({ state: 'failed' }).where(eq(readings.id, world.engineReadingId));
      return theExcerpt(world);
    },
    expected: STAFF,
  },
  'readings.start': { input: theExcerpt, expected: STAFF },
  'readings.import': { input: (world) => ({ excerptId: world.excerptId, source: 'lyrics' }), expected: STAFF },
  'readings.make_key': {
    input: (world) => ({ excerptId: world.excerptId, basedOn: world.engineReadingId, title: 'Key' }),
    expected: STAFF,
  },
  'readings.make_key (of a private reading)': {
    input: (world) => ({ excerptId: world.excerptId, basedOn: world.privateReadingId, title: 'Key' }),
    expected: may('instructor'),
  },
};
