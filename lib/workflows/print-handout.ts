import { z } from 'zod';
import { findCourse } from '@/db/queries/courses';
import { findPrint, placePrint } from '@/db/queries/handout-prints';
import { findReading } from '@/db/queries/readings';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { ASKED_CHOICES, HANDOUT_KINDS, PAPERS, type PrintOptions, STAFF_SIZES } from '@/lib/handout/print-options';
import { enqueue } from '@/lib/jobs/queue';
import { type Result, err, ok } from '@/lib/result';
import { sha256Of } from '@/lib/storage/object-store';
import { type Deps, inTransaction } from './deps';

const text = (longest: number) => z.string().max(longest, `At most ${longest} characters.`);

export const printHandoutInput = z.object({
  readingId: z.uuid(),
  /** Whose conventions the numerals follow. */
  courseId: z.uuid().nullable(),
  kind: z.enum(HANDOUT_KINDS),
  paper: z.enum(PAPERS),
  staffSize: z.enum(STAFF_SIZES),
  keysGiven: z.boolean(),
  asked: z.enum(ASKED_CHOICES),
  chosen: z.array(z.uuid()).max(5_000),
  title: text(200).trim().min(1, 'A handout needs a title.'),
  byline: text(300),
  course: text(200),
  instructions: text(3_000),
  source: text(600),
});
export type PrintHandoutInput = z.infer<typeof printHandoutInput>;

/** Orders a print of a reading that the actor may see. The same order on the same version gives the print made before. */
export async function printHandout(deps: Deps, actor: Actor, input: PrintHandoutInput): Promise<Result<{ printId: string }, AppError>> {
  const { readingId, courseId, ...options } = input;
  const head = await findReading(deps.db, actor, readingId, deps.now());
  if (!head) return err(appError('not_found'));
  if (head.state === 'proposing') return err(appError('not_ready', 'The proposal is still being worked out. Wait a moment.'));
  const course = courseId ? await findCourse(deps.db, actor, courseId) : null;
  if (courseId && !course) return err(appError('not_found'));
  const order = { by: actor.userId, courseId, conventions: course?.conventions ?? null, options };
  return inTransaction(deps, async (inside) => {
    const print = await placePrint(inside.db, actor, {
      id: inside.newId(),
      readingId,
      readingVersion: head.version,
      courseId,
      options,
      orderSha256: sha256Of(new TextEncoder().encode(JSON.stringify(order))),
    });
    if (print.isNew) await enqueue(inside.db, 'print_handout', { printId: print.id }, { id: inside.newId(), now: inside.now() });
    return ok({ printId: print.id });
  });
}

export const printInput = z.object({ printId: z.uuid() });

export interface PrintProgress {
  readonly state: 'queued' | 'ready' | 'failed';
  readonly failure: string | null;
  /** SVG texts, one a page, when it is ready. */
  readonly pages: readonly string[];
}

/** How far a print is, with its pages to look at. */
export async function readPrint(deps: Deps, actor: Actor, { printId }: z.infer<typeof printInput>): Promise<Result<PrintProgress, AppError>> {
  const print = await findPrint(deps.db, actor, printId);
  if (!print) return err(appError('not_found'));
  const { state, failure, pagesSha256 } = print;
  if (state !== 'ready' || !pagesSha256) return ok({ state, failure, pages: [] });
  const stored = await deps.storage.get(pagesSha256);
  if (!stored) return err(appError('unavailable'));
  return ok({ state, failure, pages: z.array(z.string()).parse(JSON.parse(new TextDecoder().decode(stored))) });
}

/** The PDF, as a download named by title and kind. */
export async function downloadPrint(deps: Deps, actor: Actor, { printId }: z.infer<typeof printInput>): Promise<Result<Response, AppError>> {
  const print = await findPrint(deps.db, actor, printId);
  const bytes = print?.pdfSha256 ? await deps.storage.get(print.pdfSha256) : null;
  if (!print || !bytes) return err(appError('not_found'));
  const headers = {
    'content-type': 'application/pdf',
    'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(fileName(print.options))}`,
    'cache-control': 'private, no-store',
  };
  return ok(new Response(bytes, { headers }));
}

function fileName({ title, kind }: PrintOptions): string {
  return `${title.replace(/[\\/:*?"<>|\p{Cc}]+/gu, ' ').trim()} (${kind}).pdf`;
}
