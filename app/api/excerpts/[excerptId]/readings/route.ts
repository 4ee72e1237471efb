import { listReadingsOfExcerpts } from '@/db/queries/excerpts';
import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { excerptInput } from '@/lib/workflows/library-input';

/** The readings of an excerpt and how far each is. The excerpt's page asks while the engine is at work. */
export const GET = route({ name: 'excerpts.readings', can: canUseLibrary, input: excerptInput }, async (deps, actor, { excerptId }) =>
  ok(await listReadingsOfExcerpts(deps.db, actor, [excerptId])),
);
