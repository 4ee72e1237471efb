/** What the browser finds in a chosen file before it is sent; or why it is no score, and where. */
export type FileFacts =
  | { readonly ok: true; readonly title: string; readonly composer: string; readonly work: string; readonly bars: number | null }
  | { readonly ok: false; readonly message: string; readonly line: number | null; readonly element: string | null };

/** Past this the server reads it alone: its answer comes within the job. */
const GIVE_UP_MS = 8_000;

/** The file could not be looked at here: it is sent all the same, and its own words are filled in by the server. */
const UNKNOWN: FileFacts = { ok: true, title: '', composer: '', work: '', bars: null };

/** Reads a file in a thread of its own. Never rejects: what cannot be looked at is for the server to judge. */
export async function readFile(file: File): Promise<FileFacts> {
  try {
    return await readInThread(await file.arrayBuffer());
  } catch {
    return UNKNOWN;
  }
}

function readInThread(bytes: ArrayBuffer): Promise<FileFacts> {
  const thread = new Worker(new URL('./read-file-worker.ts', import.meta.url), { type: 'module' });
  return new Promise<FileFacts>((resolve, reject) => {
    const timer = setTimeout(() => resolve(UNKNOWN), GIVE_UP_MS);
    thread.addEventListener('message', (event: MessageEvent<FileFacts>) => resolve(event.data));
    thread.addEventListener('error', () => reject(new Error('the reading thread failed')));
    thread.addEventListener('message', () => clearTimeout(timer));
    thread.postMessage(bytes, [bytes]);
  }).finally(() => thread.terminate());
}
