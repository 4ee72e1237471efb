import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { getReadingScore } from '@/lib/workflows/get-reading-score';
import { readingInput } from '@/lib/workflows/read-reading';

/** The score's file, for the desk to draw. */
export const GET = route({ name: 'readings.score', can: canBeHere, input: readingInput }, async (deps, actor, input) => {
  const file = await getReadingScore(deps, actor, input);
  return file.ok ? ok(new Response(file.value, { headers: { 'content-type': 'application/octet-stream', 'cache-control': 'private, no-store' } })) : file;
});
