'use server';

import { canCutExcerpt, canUseLibrary } from '@/lib/auth/permissions';
import { action } from '@/lib/http/action';
import { changeExcerpt, deleteExcerpt, proposeAgain, restoreExcerpt } from '@/lib/workflows/change-excerpt';
import { importReading, importReadingInput } from '@/lib/workflows/import-reading';
import { changeExcerptInput, excerptInput } from '@/lib/workflows/library-input';
import { makeAnswerKey, makeAnswerKeyInput, startReading, startReadingInput } from '@/lib/workflows/start-reading';

const shown = ({ excerptId }: { readonly excerptId: string }) => ['/library', `/excerpts/${excerptId}`];

export const changeExcerptAction = action({ name: 'excerpts.change', can: canCutExcerpt, input: changeExcerptInput, revalidate: shown }, changeExcerpt);

export const deleteExcerptAction = action({ name: 'excerpts.delete', can: canCutExcerpt, input: excerptInput, revalidate: () => ['/library'] }, deleteExcerpt);

export const restoreExcerptAction = action({ name: 'excerpts.restore', can: canCutExcerpt, input: excerptInput, revalidate: shown }, restoreExcerpt);

export const proposeAgainAction = action({ name: 'excerpts.propose_again', can: canCutExcerpt, input: excerptInput, revalidate: shown }, proposeAgain);

export const startReadingAction = action({ name: 'readings.start', can: canUseLibrary, input: startReadingInput, revalidate: shown }, startReading);

export const makeAnswerKeyAction = action({ name: 'readings.make_key', can: canUseLibrary, input: makeAnswerKeyInput, revalidate: shown }, makeAnswerKey);

export const importReadingAction = action({ name: 'readings.import', can: canUseLibrary, input: importReadingInput, revalidate: shown }, importReading);
