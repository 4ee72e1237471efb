import { findScoreStates } from '@/db/queries/scores';
import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { scoreStatesInput } from '@/lib/workflows/library-input';

/** Where the reading of some scores stands: `?ids=a,b`. The library asks while scores are being read. */
export const GET = route({ name: 'scores.states', can: canUseLibrary, input: scoreStatesInput }, async (deps, actor, { ids }) =>
  ok(await findScoreStates(deps.db, actor, ids)),
);
