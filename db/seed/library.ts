import { findExcerpt, listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { deleteReadingContent, insertReadingContent } from '@/db/queries/reading-rows';
import { findScore } from '@/db/queries/scores';
import { cutExcerpt } from '@/lib/workflows/cut-excerpt';
import type { Deps } from '@/lib/workflows/deps';
import { proposeStoredReading } from '@/lib/workflows/propose-reading';
import { readStoredScore } from '@/lib/workflows/read-score';
import { startReading } from '@/lib/workflows/start-reading';
import { uploadScore } from '@/lib/workflows/upload-score';
import { actorOf, must } from './actors';
import { DEMO_PIECES, type DemoPieceName, engravePiece } from './music';
import { DEMO_READINGS } from './music/readings';
import { parseReadingText } from './reading-text';

export interface SeededExcerpt {
  readonly piece: DemoPieceName;
  readonly scoreId: string;
  readonly excerptId: string;
  readonly engineReadingId: string;
  readonly ticksPerQuarter: number;
}

interface ExcerptPlan {
  readonly uploader: string;
  readonly title: string;
  readonly purpose: string;
}

const PLANS: Readonly<Record<DemoPieceName, ExcerptPlan>> = {
  eveningHymn: { uploader: 't.wrenfield', title: 'Evening Hymn', purpose: 'Applied leading-tone sevenths to V, vi and ii; a phrase in the relative minor' },
  staircase: { uploader: 't.wrenfield', title: 'Staircase', purpose: 'Fully diminished sevenths climbing by step, each to its target' },
  minuet: { uploader: 'i.rookhope', title: 'Minuet in C minor', purpose: 'Neapolitan and German sixth on the way to the cadence' },
  song: { uploader: 'b.ollershaw', title: 'Song without words', purpose: 'Common-tone or leading-tone seventh? Decide by where it goes' },
  romance: { uploader: 'i.rookhope', title: 'Romance for clarinet', purpose: 'To the relative major and back; a transposing instrument' },
  prelude: { uploader: 't.wrenfield', title: 'Prelude in C major', purpose: 'Hear the chords in broken figuration; pedal points' },
};

/** Uploads, reads, cuts and proposes as the people of the demo would, without waiting for the worker. */
export async function seedPiece(deps: Deps, piece: DemoPieceName): Promise<SeededExcerpt> {
  const { uploader, title, purpose } = PLANS[piece];
  const actor = actorOf(uploader);
  const notated = DEMO_PIECES[piece];
  const file = new File([engravePiece(notated)], `${title.toLowerCase().replace(/ /g, '-')}.musicxml`);
  const { composer, work, source, rights } = notated;
  const { scoreId } = must(await uploadScore(deps, actor, { title: notated.title, composer, work, source, rights, file }));
  await readStoredScore(deps, { scoreId });
  const score = await findScore(deps.db, actor, scoreId);
  if (!score?.bars || !score.ticksPerQuarter) throw new Error(`${piece} was not read: ${JSON.stringify(score?.refusal)}`);
  const { excerptId } = must(await cutExcerpt(deps, actor, { scoreId, title, purpose, firstBar: 0, lastBar: score.bars.length - 1 }));
  const [engine] = await listReadingsOfExcerpts(deps.db, actor, [excerptId]);
  if (!engine) throw new Error(`${piece} has no proposal`);
  await proposeStoredReading(deps, { readingId: engine.id });
  return { piece, scoreId, excerptId, engineReadingId: engine.id, ticksPerQuarter: score.ticksPerQuarter };
}

/** A person's reading with our own labels, all accepted. */
export async function seedOwnReading(deps: Deps, mailbox: string, excerpt: SeededExcerpt): Promise<string> {
  const actor = actorOf(mailbox);
  const { readingId } = must(await startReading(deps, actor, { excerptId: excerpt.excerptId }));
  const found = await findExcerpt(deps.db, actor, excerpt.excerptId);
  const content = parseReadingText(DEMO_READINGS[excerpt.piece], {
    ticksPerQuarter: excerpt.ticksPerQuarter,
    newId: deps.newId,
    state: 'accepted',
  });
  if (content.end !== found?.endTick) throw new Error(`the reading of ${excerpt.piece} ends at ${content.end}, not at ${found?.endTick}`);
  await deleteReadingContent(deps.db, readingId);
  await insertReadingContent(deps.db, readingId, content);
  return readingId;
}
