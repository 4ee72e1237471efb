'use client';

import { useCallback, useEffect, useState } from 'react';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScoreText } from '@/lib/score/read-score';
import type { Score } from '@/lib/score/score';

export type LoadedScore =
  | { readonly state: 'loading' }
  | { readonly state: 'ready'; readonly xml: string; readonly score: Score }
  | { readonly state: 'failed'; readonly message: string };

/** Fetches the score's file and reads it here in the browser, by the same code that the server uses. */
export function useScore(url: string): { readonly loaded: LoadedScore; retry(): void } {
  const [loaded, setLoaded] = useState<LoadedScore>({ state: 'loading' });
  const [turn, setTurn] = useState(0);
  useEffect(() => {
    let live = true;
    void loadScore(url).then((result) => live && setLoaded(result));
    return () => {
      live = false;
    };
  }, [url, turn]);
  const retry = useCallback(() => {
    setLoaded({ state: 'loading' });
    setTurn((n) => n + 1);
  }, []);
  return { loaded, retry };
}

async function loadScore(url: string): Promise<LoadedScore> {
  const response = await fetch(url).catch(() => null);
  if (!response) return { state: 'failed', message: 'The server cannot be reached. Check the connection and try again.' };
  if (!response.ok) return { state: 'failed', message: 'The score’s file could not be fetched. Try again, or open the score in the library.' };
  const opened = openScoreFile(new Uint8Array(await response.arrayBuffer()));
  if (!opened.ok) return { state: 'failed', message: opened.error.message };
  const score = readScoreText(opened.value.xml);
  return score.ok ? { state: 'ready', xml: opened.value.xml, score: score.value } : { state: 'failed', message: score.error.message };
}
