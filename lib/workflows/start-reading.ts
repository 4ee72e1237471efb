import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { type ExcerptRow, findExcerpt, listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { type StoredReading, insertReading, insertReadingContent, unsafeLoadReadingContent } from '@/db/queries/reading-rows';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { ReadingKind } from '@/lib/vocabularies';
import { type Deps, inTransaction } from './deps';

export const startReadingInput = z.object({
  excerptId: z.uuid(),
  /** A reading of the excerpt to start from; the engine's when it is left out. */
  basedOn: z.uuid().optional(),
});
export type StartReadingInput = z.infer<typeof startReadingInput>;

export const makeAnswerKeyInput = z.object({
  excerptId: z.uuid(),
  basedOn: z.uuid(),
  title: z.string().trim().min(1, 'A key needs a title.').max(300, 'At most 300 characters.'),
});
export type MakeAnswerKeyInput = z.infer<typeof makeAnswerKeyInput>;

export interface StartedReading {
  readonly readingId: string;
  readonly excerptId: string;
}

/** A reading of one's own, with the labels of another (the engine's, unless said) as suggestions. */
export async function startReading(deps: Deps, actor: Actor, input: StartReadingInput): Promise<Result<StartedReading, AppError>> {
  const source = await findSource(deps, actor, input.excerptId, input.basedOn ?? null);
  if (!source.ok) return source;
  return copyReading(deps, actor, { ...source.value, kind: 'person', title: `Reading by ${actor.name}`, content: asSuggestions });
}

/** An answer key with the labels of a reading as they stand. */
export async function makeAnswerKey(deps: Deps, actor: Actor, input: MakeAnswerKeyInput): Promise<Result<StartedReading, AppError>> {
  const source = await findSource(deps, actor, input.excerptId, input.basedOn);
  if (!source.ok) return source;
  return copyReading(deps, actor, { ...source.value, kind: 'key', title: input.title, content: (stored) => stored });
}

interface Source {
  readonly excerpt: ExcerptRow;
  readonly basedOn: string;
}

async function findSource(deps: Deps, actor: Actor, excerptId: string, basedOn: string | null): Promise<Result<Source, AppError>> {
  const excerpt = await findExcerpt(deps.db, actor, excerptId);
  if (!excerpt) return err(appError('not_found'));
  const visible = await listReadingsOfExcerpts(deps.db, actor, [excerptId]);
  const reading = visible.find((each) => (basedOn ? each.id === basedOn : each.kind === 'engine' && each.state !== 'failed'));
  if (!reading) return err(appError('not_found'));
  if (reading.state === 'proposing') return err(appError('not_ready', 'The proposal is still being worked out. Wait a moment.'));
  return ok({ excerpt, basedOn: reading.id });
}

function asSuggestions(stored: StoredReading): StoredReading {
  return { ...stored, labels: stored.labels.map((label) => ({ ...label, state: 'suggested' })) };
}

interface Copy extends Source {
  readonly kind: ReadingKind;
  readonly title: string;
  readonly content: (stored: StoredReading) => StoredReading;
}

function copyReading(deps: Deps, actor: Actor, copy: Copy): Promise<Result<StartedReading, AppError>> {
  const { excerpt, basedOn, kind, title } = copy;
  const { startTick, endTick } = excerpt;
  return inTransaction(deps, async (inside) => {
    const stored = await unsafeLoadReadingContent(inside.db, { id: basedOn, startTick, endTick });
    return keepNewReading(inside, actor, { excerpt, kind, title, basedOn, content: withNewIds(inside, copy.content(stored)) });
  });
}

export interface NewReading {
  readonly excerpt: ExcerptRow;
  readonly kind: ReadingKind;
  readonly title: string;
  /** The reading that it was copied from. */
  readonly basedOn: string | null;
  /** Its labels have ids that no other reading has. */
  readonly content: StoredReading;
}

/** Keeps a new reading of the actor's own; call it inside a transaction. */
export async function keepNewReading(inside: Deps, actor: Actor, { excerpt, kind, title, basedOn, content }: NewReading): Promise<Result<StartedReading, AppError>> {
  const { id: excerptId, startTick, endTick } = excerpt;
  const readingId = inside.newId();
  await insertReading(inside.db, {
    id: readingId,
    excerptId,
    departmentId: actor.departmentId,
    ownerId: actor.userId,
    kind,
    title: title.slice(0, 300),
    state: 'open',
    startTick,
    endTick,
    basedOn,
  });
  await insertReadingContent(inside.db, readingId, content);
  await noteAudit(inside, actor, { verb: 'start', subjectKind: kind === 'key' ? 'key' : 'reading', subjectId: readingId });
  return ok({ readingId, excerptId });
}

function withNewIds(deps: Deps, stored: StoredReading): StoredReading {
  return { ...stored, labels: stored.labels.map((label) => ({ ...label, id: deps.newId() })) };
}
