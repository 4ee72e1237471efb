import { Zip, ZipDeflate, ZipPassThrough } from 'fflate';
import { noteAudit } from '@/db/queries/audit';
import { type DataSet, PAGE, departmentDataSets, listScoreFiles } from '@/db/queries/department-data';
import { getDepartment } from '@/db/queries/members';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { describeError } from '@/lib/log';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';

/**
 * Everything of the department as one .zip, made while it is sent: `department.json`, one `<table>.ndjson` per kind of
 * row (a JSON object per line), and the score files under `files/<sha256>-<name>`.
 */
export async function exportDepartment(deps: Deps, actor: Actor): Promise<Result<Response, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  await noteAudit(deps, actor, { verb: 'department.export', subjectKind: 'department', subjectId: actor.departmentId });
  const body = streamOf(logged(deps, actor, zipDepartment(deps, actor)));
  const day = deps.now().toISOString().slice(0, 10);
  return ok(
    new Response(body, {
      headers: {
        'content-type': 'application/zip',
        'content-disposition': `attachment; filename="understave-department-${day}.zip"`,
        'cache-control': 'private, no-store',
      },
    }),
  );
}

/** Made no faster than it is taken. */
function streamOf(parts: AsyncGenerator<Uint8Array>): ReadableStream<Uint8Array> {
  return new ReadableStream({
    async pull(controller) {
      const next = await parts.next();
      if (next.done) controller.close();
      else controller.enqueue(next.value);
    },
    async cancel() {
      await parts.return(undefined);
    },
  });
}

/** Once it has begun, an answer can only be broken off: the archive then has no end, and no reader takes it for whole. */
async function* logged(deps: Deps, actor: Actor, parts: AsyncGenerator<Uint8Array>): AsyncGenerator<Uint8Array> {
  try {
    yield* parts;
  } catch (error) {
    deps.log.error({ endpoint: 'department.export', departmentId: actor.departmentId, ...describeError(error) }, 'an export broke off');
    throw error;
  }
}

async function* zipDepartment(deps: Deps, actor: Actor): AsyncGenerator<Uint8Array> {
  const ready: Uint8Array[] = [];
  const zip = new Zip((error, chunk) => {
    if (error) throw error;
    ready.push(chunk);
  });
  const drain = () => ready.splice(0);
  addText(zip, 'department.json', JSON.stringify(await getDepartment(deps.db, actor), null, 2));
  for (const set of departmentDataSets(deps.db, actor)) {
    const entry = new ZipDeflate(`${set.name}.ndjson`);
    zip.add(entry);
    for await (const lines of linesOf(set)) {
      entry.push(lines);
      yield* drain();
    }
    entry.push(new Uint8Array(), true);
  }
  for await (const _file of addFiles(deps, actor, zip)) yield* drain();
  zip.end();
  yield* drain();
}

function addText(zip: Zip, name: string, text: string): void {
  const entry = new ZipDeflate(name);
  zip.add(entry);
  entry.push(new TextEncoder().encode(text), true);
}

async function* linesOf(set: DataSet): AsyncGenerator<Uint8Array> {
  let after = '';
  for (;;) {
    const rows = await set.page(after);
    yield new TextEncoder().encode(rows.map((row) => `${JSON.stringify(row)}\n`).join(''));
    const last = rows.at(-1);
    if (!last || rows.length < PAGE) return;
    after = last.id;
  }
}

/** Adds the files one by one; a file that the store has lost is left out, and its score's row says which it was. */
async function* addFiles(deps: Deps, actor: Actor, zip: Zip): AsyncGenerator<string> {
  for (const { sha256, fileName } of await listScoreFiles(deps.db, actor)) {
    const bytes = await deps.storage.get(sha256);
    if (!bytes) continue;
    const entry = new ZipPassThrough(`files/${sha256}-${fileName.replace(/[^\p{L}\p{N}._-]+/gu, '_')}`);
    zip.add(entry);
    entry.push(bytes, true);
    yield sha256;
  }
}
