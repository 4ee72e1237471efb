'use client';

/**
 * The desk: a score with its key line and numeral line, the margin, the ledger. Used for one's own reading, another's, a
 * student's work and its feedback.
 *
 *   <Desk
 *     base={`/api/readings/${readingId}`}   GET it, GET and POST …/edits, …/remarks; the score at …/score
 *     scoreUrl={`/api/readings/${readingId}/score`}
 *     mode="answer"                         edit | read | answer | feedback (desk-types.ts)
 *     userId reading version firstBar lastBar
 *     rules={{ spansGiven, keysGiven, askedStarts }}   what a student may touch; the server checks the same
 *     feedback={{ [labelId]: { shape, tone, note?, verdict, points?, body? } }}
 *     sheet={course.conventions ?? DEFAULT_CONVENTIONS}
 *     heading={…} actions={<HandIn />}
 *   />
 *
 * It fills the height its parent gives it and scrolls inside itself. Proposals must not be in `reading` for a student:
 * the server's loadReading (lib/workflows/read-reading.ts) takes them out.
 */
import '@/components/score/score.css';
import { ErrorNote, Button, Spinner } from '@/components/ui';
import { DeskBody } from './desk-body';
import type { DeskProps } from './desk-types';
import { useScore } from './use-score';

export type { DeskMode, DeskProps, DeskRules, Feedback } from './desk-types';

export function Desk(props: DeskProps) {
  const { loaded, retry } = useScore(props.scoreUrl);
  if (loaded.state === 'ready' && props.reading.labels.length > 0) return <DeskBody key={props.base ?? 'unkept'} {...props} xml={loaded.xml} score={loaded.score} />;
  return (
    <div className="flex h-full min-h-96 flex-col">
      <div className="flex min-h-11 items-center border-b border-rule-strong px-3">{props.heading}</div>
      <div className="flex flex-1 items-center justify-center p-6">
        {loaded.state === 'failed' ? (
          <ErrorNote title="The score cannot be shown." action={<Button size="small" onClick={retry}>Try again</Button>}>{loaded.message}</ErrorNote>
        ) : loaded.state === 'loading' ? (
          <p role="status" className="flex items-center gap-2 text-ink-soft"><Spinner label="" /> Fetching the score</p>
        ) : (
          <p className="text-ink-soft">This reading has no labels: the excerpt is silent.</p>
        )}
      </div>
    </div>
  );
}
