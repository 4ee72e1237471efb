import type { FileFacts } from './read-file';

/**
 * A file on its way into the library:
 * looking (the browser reads it) → asking (a person looks at its title) → sending → waiting (the server reads it) → ready.
 * `refused` says what is wrong with the file; `failed` what went wrong on the way, and can be tried again as it is;
 * `existing` is in the library already.
 */
export const UPLOAD_STAGES = ['looking', 'asking', 'queued', 'sending', 'waiting', 'ready', 'refused', 'failed', 'existing'] as const;
export type UploadStage = (typeof UPLOAD_STAGES)[number];

export interface Upload {
  readonly id: number;
  readonly file: File;
  readonly stage: UploadStage;
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  /** Bytes sent. */
  readonly sent: number;
  /** A sentence for people when refused, failed or existing. */
  readonly problem: string | null;
  /** In words: `line 214, element backup`; null when there is none. */
  readonly place: string | null;
  readonly scoreId: string | null;
}

export type UploadEvent =
  | { readonly kind: 'chosen'; readonly files: readonly { readonly id: number; readonly file: File; readonly problem: string | null }[] }
  | { readonly kind: 'looked'; readonly id: number; readonly facts: FileFacts }
  | { readonly kind: 'typed'; readonly id: number; readonly words: Partial<Pick<Upload, 'title' | 'composer' | 'work'>> }
  | { readonly kind: 'submitted' }
  | { readonly kind: 'retried'; readonly id: number }
  | { readonly kind: 'begun'; readonly id: number }
  | { readonly kind: 'progressed'; readonly id: number; readonly sent: number }
  | { readonly kind: 'answered'; readonly id: number; readonly answer: SendAnswer }
  | { readonly kind: 'read'; readonly scoreId: string; readonly title: string; readonly problem: string | null; readonly place: string | null }
  | { readonly kind: 'removed'; readonly id: number };

/** How sending one file ended. */
export type SendAnswer =
  | { readonly outcome: 'stored'; readonly scoreId: string; readonly title: string }
  | { readonly outcome: 'existing'; readonly scoreId: string; readonly title: string }
  | { readonly outcome: 'refused'; readonly problem: string }
  | { readonly outcome: 'failed'; readonly problem: string };

export function reduceUploads(uploads: readonly Upload[], event: UploadEvent): readonly Upload[] {
  switch (event.kind) {
    case 'chosen':
      return [...uploads, ...event.files.map(begin)];
    case 'submitted':
      return uploads.map((upload) => (upload.stage === 'asking' ? { ...upload, stage: 'queued', problem: null } : upload));
    case 'read':
      return uploads.map((upload) => (upload.scoreId === event.scoreId && upload.stage === 'waiting' ? settle(upload, event) : upload));
    case 'removed':
      return uploads.filter((upload) => upload.id !== event.id);
    default:
      return uploads.map((upload) => (upload.id === event.id ? changeOne(upload, event) : upload));
  }
}

function begin({ id, file, problem }: { readonly id: number; readonly file: File; readonly problem: string | null }): Upload {
  return { id, file, stage: problem ? 'refused' : 'looking', title: '', composer: '', work: '', sent: 0, problem, place: null, scoreId: null };
}

function changeOne(upload: Upload, event: Extract<UploadEvent, { readonly id: number }>): Upload {
  switch (event.kind) {
    case 'looked':
      return look(upload, event.facts);
    case 'typed':
      return { ...upload, ...event.words };
    case 'retried':
      return { ...upload, stage: 'queued', problem: null, sent: 0 };
    case 'begun':
      return { ...upload, stage: 'sending', sent: 0 };
    case 'progressed':
      return { ...upload, sent: event.sent };
    case 'answered':
      return answer(upload, event.answer);
    case 'removed':
      return upload;
  }
}

function look(upload: Upload, facts: FileFacts): Upload {
  if (!facts.ok) return { ...upload, stage: 'refused', problem: facts.message, place: formatPlace(facts.line, facts.element) };
  const title = upload.title || facts.title || upload.file.name.replace(/\.(musicxml|xml|mxl)$/i, '');
  return { ...upload, stage: 'asking', title, composer: upload.composer || facts.composer, work: upload.work || facts.work };
}

function answer(upload: Upload, sent: SendAnswer): Upload {
  if (sent.outcome === 'stored') return { ...upload, stage: 'waiting', scoreId: sent.scoreId, title: sent.title };
  if (sent.outcome === 'existing') return { ...upload, stage: 'existing', scoreId: sent.scoreId, problem: `The library holds this file already, as “${sent.title}”.` };
  return { ...upload, stage: sent.outcome, problem: sent.problem };
}

function settle(upload: Upload, event: Extract<UploadEvent, { readonly kind: 'read' }>): Upload {
  return { ...upload, stage: event.problem ? 'refused' : 'ready', title: event.title, problem: event.problem, place: event.place };
}

/** Where in the file, for people: `line 214, element backup`; null when the file as a whole is meant. */
export function formatPlace(line: number | null | undefined, element: string | null | undefined): string | null {
  const parts = [line ? `line ${line}` : '', element ? `element <${element}>` : ''].filter(Boolean);
  return parts.length > 0 ? parts.join(', ') : null;
}
