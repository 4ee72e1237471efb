import type { SendAnswer } from './uploads';

export interface ScoreForm {
  readonly file: File;
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly source: string;
  readonly rights: string;
}

const LOST = 'The connection was lost while sending. Nothing is lost here: try again when you are online.';
const UNCLEAR = 'The server did not answer as expected. Try again in a moment.';

/** Sends one file with XMLHttpRequest, the only way to hear how much has gone out. Never rejects. */
export function sendScore(address: string, form: ScoreForm, onProgress: (sent: number) => void): Promise<SendAnswer> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('POST', address);
    request.responseType = 'json';
    request.upload.addEventListener('progress', (event) => onProgress(Math.min(event.loaded, form.file.size)));
    request.addEventListener('load', () => resolve(answerOf(request.status, request.response)));
    request.addEventListener('error', () => resolve({ outcome: 'failed', problem: LOST }));
    request.addEventListener('abort', () => resolve({ outcome: 'failed', problem: LOST }));
    request.send(bodyOf(form));
  });
}

function bodyOf({ file, ...words }: ScoreForm): FormData {
  const body = new FormData();
  for (const [name, value] of Object.entries(words)) body.set(name, value);
  body.set('file', file);
  return body;
}

/** A file that is wrong will stay wrong; everything else is worth another try. */
function answerOf(status: number, response: unknown): SendAnswer {
  if (status === 200 && isStored(response)) {
    return { outcome: response.existing ? 'existing' : 'stored', scoreId: response.scoreId, title: response.title };
  }
  const problem = problemOf(response) ?? UNCLEAR;
  return { outcome: status === 413 || status === 422 ? 'refused' : 'failed', problem };
}

function isStored(response: unknown): response is { scoreId: string; title: string; existing: boolean } {
  return typeof response === 'object' && response !== null && 'scoreId' in response && 'title' in response && 'existing' in response;
}

function problemOf(response: unknown): string | null {
  if (typeof response !== 'object' || response === null || !('error' in response)) return null;
  const { error } = response as { error: { message?: string; fields?: Record<string, string> } };
  const fields = Object.values(error.fields ?? {});
  return fields.length > 0 ? fields.join(' ') : (error.message ?? null);
}
