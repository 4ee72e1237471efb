'use client';

import { useCallback, useEffect, useReducer, useRef } from 'react';
import { readFile } from './read-file';
import { sendScore } from './send-score';
import { type Upload, type UploadEvent, reduceUploads } from './uploads';

/** Files on the wire at a time: more would only make each slower. */
const AT_ONCE = 2;

export interface Statements {
  readonly source: string;
  readonly rights: string;
}

export interface Uploads {
  readonly uploads: readonly Upload[];
  readonly dispatch: (event: UploadEvent) => void;
  /** Takes files; each comes with what is wrong with it at first sight, or null. */
  readonly choose: (files: readonly { readonly file: File; readonly problem: string | null }[]) => void;
}

/** The files on their way: looks into each as it is chosen, sends what is queued, two at a time. */
export function useUploads(address: string, statements: Statements): Uploads {
  const [uploads, dispatch] = useReducer(reduceUploads, []);
  const lastId = useRef(0);
  const choose = useCallback((files: readonly { readonly file: File; readonly problem: string | null }[]) => {
    const numbered = files.map((each) => ({ ...each, id: (lastId.current += 1) }));
    dispatch({ kind: 'chosen', files: numbered });
    for (const { id, file, problem } of numbered) {
      if (!problem) void readFile(file).then((facts) => dispatch({ kind: 'looked', id, facts }));
    }
  }, []);
  useSending(address, statements, uploads, dispatch);
  useLeaveWarning(uploads.some(({ stage }) => stage === 'sending' || stage === 'queued'));
  return { uploads, dispatch, choose };
}

function useSending(address: string, statements: Statements, uploads: readonly Upload[], dispatch: (event: UploadEvent) => void): void {
  const begun = useRef(new Set<Upload>());
  useEffect(() => {
    const room = AT_ONCE - uploads.filter(({ stage }) => stage === 'sending').length;
    for (const upload of uploads.filter(({ stage }) => stage === 'queued').slice(0, Math.max(0, room))) {
      // The same row object is sent once, even when effects run twice in development.
      if (begun.current.has(upload)) continue;
      begun.current.add(upload);
      dispatch({ kind: 'begun', id: upload.id });
      const { id, file, title, composer, work } = upload;
      void sendScore(address, { file, title, composer, work, ...statements }, (sent) => dispatch({ kind: 'progressed', id, sent })).then((answer) =>
        dispatch({ kind: 'answered', id, answer }),
      );
    }
  }, [address, statements, uploads, dispatch]);
}

/** The browser asks before the page is left while files are on the wire. */
function useLeaveWarning(active: boolean): void {
  useEffect(() => {
    if (!active) return undefined;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [active]);
}
