'use server';

import { canCutExcerpt, canUploadScore } from '@/lib/auth/permissions';
import { action } from '@/lib/http/action';
import { changeScore, deleteScore, readScoreAgain, restoreScore } from '@/lib/workflows/change-score';
import { cutExcerpt } from '@/lib/workflows/cut-excerpt';
import { changeScoreInput, cutExcerptInput, scoreInput } from '@/lib/workflows/library-input';

const shown = ({ scoreId }: { readonly scoreId: string }) => ['/library', `/scores/${scoreId}`];

export const changeScoreAction = action({ name: 'scores.change', can: canUploadScore, input: changeScoreInput, revalidate: shown }, changeScore);

export const deleteScoreAction = action({ name: 'scores.delete', can: canUploadScore, input: scoreInput, revalidate: () => ['/library'] }, deleteScore);

export const restoreScoreAction = action({ name: 'scores.restore', can: canUploadScore, input: scoreInput, revalidate: shown }, restoreScore);

export const readScoreAgainAction = action({ name: 'scores.read_again', can: canUploadScore, input: scoreInput, revalidate: shown }, readScoreAgain);

export const cutExcerptAction = action({ name: 'excerpts.cut', can: canCutExcerpt, input: cutExcerptInput, revalidate: shown }, cutExcerpt);
