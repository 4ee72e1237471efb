import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { hasSubmissions, unsafeListQuestions } from '@/db/queries/assignments';
import { questions } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import type { Framed } from '@/lib/marking/key-reading';
import { signFramed } from '@/lib/marking/frame';
import { type Result, err, ok } from '@/lib/result';
import type { acceptAlternativeInput, setQuestionsInput } from './assignment-input';
import { findEditable } from './change-assignment';
import { type Deps, inTransaction } from './deps';
import { unsafeGetKey } from './key-of-assignment';

type Changed = Result<{ readonly assignmentId: string }, AppError>;

/** Which spans are asked, and what each is worth. Points may change at any time; the spans only until someone begins. */
export async function setQuestions(deps: Deps, actor: Actor, input: z.output<typeof setQuestionsInput>): Promise<Changed> {
  const assignment = await findEditable(deps, actor, input.assignmentId);
  if (!assignment.ok) return assignment;
  const { key } = await unsafeGetKey(deps, input.assignmentId);
  const starts = new Set<number>(key.labels.map((label) => label.start));
  if (input.questions.some((question) => !starts.has(question.startTick))) {
    return err(appError('bad_input', 'The key has changed meanwhile: reload the page to see its spans.'));
  }
  const before = new Map((await unsafeListQuestions(deps.db, input.assignmentId)).map((question) => [question.startTick, question]));
  const isReformed = before.size !== input.questions.length || input.questions.some((question) => !before.has(question.startTick));
  if (isReformed && (await hasSubmissions(deps.db, input.assignmentId))) {
    return err(appError('in_use', 'Students have begun: the asked spans can no longer change. Their points can.'));
  }
  await inTransaction(deps, async (inside) => {
    await inside.db.delete(questions).where(eq(questions.assignmentId, input.assignmentId));
    const rows = input.questions.map(({ startTick, points }) => ({
      id: inside.newId(),
      assignmentId: input.assignmentId,
      startTick,
      points,
      alternatives: before.get(startTick)?.alternatives ?? [],
    }));
    if (rows.length > 0) await inside.db.insert(questions).values(rows);
  });
  return ok({ assignmentId: input.assignmentId });
}

type AlternativeInput = z.output<typeof acceptAlternativeInput>;

/** Takes one more chord for right on a span of the key. */
export function acceptAlternative(deps: Deps, actor: Actor, input: AlternativeInput): Promise<Changed> {
  return changeAlternatives(deps, actor, input, (before, own) => {
    const known = [own, ...before].some((chord) => signFramed(chord) === signFramed(input.chord));
    return known ? err(appError('already_there', 'The key takes this already.')) : ok([...before, input.chord]);
  });
}

export function dropAlternative(deps: Deps, actor: Actor, input: AlternativeInput): Promise<Changed> {
  return changeAlternatives(deps, actor, input, (before) => ok(before.filter((chord) => signFramed(chord) !== signFramed(input.chord))));
}

type Change = (before: readonly Framed[], own: Framed) => Result<readonly Framed[], AppError>;

async function changeAlternatives(deps: Deps, actor: Actor, input: AlternativeInput, change: Change): Promise<Changed> {
  const assignment = await findEditable(deps, actor, input.assignmentId);
  if (!assignment.ok) return assignment;
  const { key } = await unsafeGetKey(deps, input.assignmentId);
  const label = key.labels.find((one) => one.start === input.startTick && one.asked);
  if (!label?.numeral) return err(appError('not_found'));
  const alternatives = change(label.alternatives, { key: label.key, numeral: label.numeral });
  if (!alternatives.ok) return alternatives;
  await deps.db
    .update(questions)
    .set({ alternatives: alternatives.value })
    .where(and(eq(questions.assignmentId, input.assignmentId), eq(questions.startTick, input.startTick)));
  return ok({ assignmentId: input.assignmentId });
}
