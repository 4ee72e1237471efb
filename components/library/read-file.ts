/** What the browser finds in a chosen file before it is sent; or why it is no score, and where. */
export type FileFacts =
  | { readonly ok: true; readonly title: string; readonly composer: string; readonly work: string; readonly bars: number | null }
  | { readonly ok: false; readonly message: string; readonly line: number | null; readonly element: string | null };

/** Bounds in milliseconds, for the thread to start and then to read; past them the server reads the file alone. */
const START_WITHIN = 30_000;
const READ_WITHIN = 10_000;

/** The file could not be looked at here: it is sent all the same, and its own words are filled in by the server. */
const UNKNOWN: FileFacts = { ok: true, title: '', composer: '', work: '', bars: null };

let queue: Promise<unknown> = Promise.resolve();

/** Reads a file in a thread of its own, after those asked for before. Never rejects: what cannot be looked at is for the server to judge. */
export function readFile(file: File): Promise<FileFacts> {
  const facts = queue.then(async () => readInThread(await file.arrayBuffer())).catch(() => UNKNOWN);
  queue = facts;
  return facts;
}

function readInThread(bytes: ArrayBuffer): Promise<FileFacts> {
  const thread = new Worker(new URL('./read-file-worker.ts', import.meta.url), { type: 'module' });
  return new Promise<FileFacts>((resolve, reject) => {
    let timer = setTimeout(() => resolve(UNKNOWN), START_WITHIN);
    thread.addEventListener('error', () => reject(new Error('the reading thread failed')));
    thread.addEventListener('message', ({ data }: MessageEvent<FileFacts | 'started'>) => {
      clearTimeout(timer);
      if (data !== 'started') return resolve(data);
      timer = setTimeout(() => resolve(UNKNOWN), READ_WITHIN);
      return thread.postMessage(bytes, [bytes]);
    });
  }).finally(() => thread.terminate());
}
