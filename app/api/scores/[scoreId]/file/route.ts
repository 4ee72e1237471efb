import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { type ScoreFile, getScoreFile } from '@/lib/workflows/get-score-file';
import { scoreInput } from '@/lib/workflows/library-input';

/** The file as it was uploaded, under the name it came with. */
export const GET = route({ name: 'scores.file', can: canUseLibrary, input: scoreInput }, async (deps, actor, input) => {
  const file = await getScoreFile(deps, actor, input);
  return file.ok ? ok(download(file.value)) : file;
});

function download({ bytes, fileName, mediaType }: ScoreFile): Response {
  const ascii = fileName.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  return new Response(bytes, {
    headers: {
      'content-type': mediaType,
      'content-disposition': `attachment; filename="${ascii}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
      'cache-control': 'private, no-store',
    },
  });
}
