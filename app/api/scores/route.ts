import { canUploadScore } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { DEFAULT_LIMITS } from '@/lib/score/limits';
import { uploadScore, uploadScoreInput } from '@/lib/workflows/upload-score';

/** The file at its largest, and a margin for the form's words. */
const MAX_BYTES = DEFAULT_LIMITS.fileBytes + 64 * 1024;

/** Upload of one file: a form with `file`, `title`, `composer`, `work`, `source` and `rights`. */
export const POST = route({ name: 'scores.upload', can: canUploadScore, body: 'form', maxBytes: MAX_BYTES, input: uploadScoreInput }, uploadScore);
