'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { type BarRange, type PrintedBar, pickBar } from '@/components/library/bar-range';
import { type Cut, CutForm } from '@/components/library/cut-form';
import { ScoreSheet } from '@/components/library/score-sheet';
import { ErrorNote, useAnnouncer } from '@/components/ui';
import { cutExcerptAction } from '../actions';

interface CutExcerptProps {
  readonly scoreId: string;
  readonly scoreTitle: string;
  readonly bars: readonly PrintedBar[];
}

/** Bars that a first cut offers. */
const FIRST_BARS = 8;

/** The score, and above it the form that cuts bars out of it. Each shows what the other chose. */
export function CutExcerpt({ scoreId, scoreTitle, bars }: CutExcerptProps) {
  const router = useRouter();
  const { announce } = useAnnouncer();
  const [range, setRange] = useState<BarRange>({ first: 0, last: Math.min(FIRST_BARS, bars.length) - 1 });
  const [picking, setPicking] = useState<number | null>(null);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const pick = (bar: number) => {
    const next = pickBar(picking, bar);
    setRange(next.range);
    setPicking(next.picking);
  };
  const cut = async ({ first, last, title, purpose }: Cut) => {
    setBusy(true);
    const answer = await cutExcerptAction({ scoreId, firstBar: first, lastBar: last, title, purpose }).catch(() => null);
    setBusy(false);
    if (!answer?.ok) return setFailure(answer ? Object.values(answer.error.fields ?? {})[0] ?? answer.error.message : 'The server cannot be reached. Try again.');
    announce('The excerpt was cut. Its chords are being worked out.');
    router.push(`/excerpts/${answer.value.excerptId}`);
  };
  return (
    <>
      <div className="sticky top-0 z-20">
        <CutForm bars={bars} scoreTitle={scoreTitle} range={range} onRange={setRange} busy={busy} onCut={(wanted) => void cut(wanted)} />
      </div>
      {failure ? <ErrorNote className="mt-2">{failure}</ErrorNote> : null}
      <p className="py-2 text-small text-ink-soft">
        {picking === null ? 'Or pick the bars on the score: the first, then the last.' : 'Now the last bar.'}
      </p>
      <ScoreSheet fileUrl={`/api/scores/${scoreId}/file`} range={range} onPick={pick} />
    </>
  );
}
