import { canUseLibrary } from '@/lib/auth/permissions';
import { attachment } from '@/lib/http/attachment';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { getScoreFile } from '@/lib/workflows/get-score-file';
import { scoreInput } from '@/lib/workflows/library-input';

/** The file as it was uploaded, under the name it came with. */
export const GET = route({ name: 'scores.file', can: canUseLibrary, input: scoreInput }, async (deps, actor, input) => {
  const file = await getScoreFile(deps, actor, input);
  return file.ok ? ok(attachment(file.value)) : file;
});
