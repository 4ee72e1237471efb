'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { DeskRules } from '@/components/reading/desk';
import { isGiven } from '@/components/reading/desk-types';
import { type FetchedReading, fetchReading } from '@/components/reading/reading-client';
import type { SaveState } from '@/components/reading/use-saving';
import { type PlacedBar, placeOf } from '@/components/marking/place-names';
import { Button, Dialog, DialogActions, ErrorNote, WarningNote, useAnnouncer } from '@/components/ui';
import { handIn } from '../../actions';

interface HandInProps {
  readonly submissionId: string;
  readonly base: string;
  readonly saving: SaveState;
  readonly rules: DeskRules;
  readonly bars: readonly PlacedBar[];
  readonly late: boolean;
  readonly lastAttempt: boolean;
}

/** Hands in what the server holds, once it holds everything; first says what is still blank. */
export function HandIn(props: HandInProps) {
  const { base, saving } = props;
  const [asked, setAsked] = useState<FetchedReading | 'unreachable' | null>(null);
  const [looking, setLooking] = useState(false);
  const look = async () => {
    setLooking(true);
    setAsked((await fetchReading(base)) ?? 'unreachable');
    setLooking(false);
  };
  return (
    <>
      <Button size="small" kind="primary" busy={looking || saving === 'saving'} onClick={() => void look()}>Hand in</Button>
      <Dialog open={asked !== null} onOpenChange={() => setAsked(null)} title="Hand this in?">
        {asked === null ? null : asked === 'unreachable' || saving !== 'saved' ? (
          <NotSaved close={() => setAsked(null)} />
        ) : (
          <Ready {...props} held={asked} close={() => setAsked(null)} />
        )}
      </Dialog>
    </>
  );
}

function NotSaved({ close }: { readonly close: () => void }) {
  return (
    <>
      <ErrorNote title="Not everything is saved yet">
        The server cannot be reached, or you were signed out. Your work is kept in this browser: stay on the page until it says “Saved”, then hand in.
      </ErrorNote>
      <DialogActions><Button kind="primary" onClick={close}>Back to the desk</Button></DialogActions>
    </>
  );
}

/** Blanks listed by name up to here; more are counted. */
const MOST_NAMED = 12;

function Ready({ submissionId, rules, bars, late, lastAttempt, held, close }: HandInProps & { readonly held: FetchedReading; readonly close: () => void }) {
  const router = useRouter();
  const { announce } = useAnnouncer();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const blanks = held.reading.labels.filter((label) => !label.numeral && !isGiven(label, rules));
  const send = async () => {
    setBusy(true);
    const outcome = await handIn({ submissionId, version: held.version }).catch(() => null);
    setBusy(false);
    if (!outcome?.ok) return setFailure(outcome?.error.message ?? 'The server did not answer. Nothing was lost; try again.');
    close();
    announce('Handed in.');
    router.refresh();
  };
  return (
    <div className="flex flex-col gap-3">
      {failure ? <ErrorNote>{failure}</ErrorNote> : null}
      {blanks.length > 0 ? (
        <WarningNote title={blanks.length === 1 ? 'One label is blank' : `${blanks.length} labels are blank`}>
          {blanks.slice(0, MOST_NAMED).map((label) => placeOf(bars, label.start)).join('; ')}
          {blanks.length > MOST_NAMED ? `; and ${blanks.length - MOST_NAMED} more` : ''}
        </WarningNote>
      ) : (
        <p>Every label is written.</p>
      )}
      {late ? <p>It is past the due date: your work will be marked as late.</p> : null}
      <p className="text-ink-soft">{lastAttempt ? 'This is your last attempt: it cannot be changed afterwards.' : 'It cannot be changed afterwards; you can begin another attempt.'}</p>
      <DialogActions>
        <Button onClick={close}>Keep working</Button>
        <Button kind="primary" busy={busy} busyText="Handing in …" onClick={() => void send()}>{blanks.length > 0 ? 'Hand in with blanks' : 'Hand in'}</Button>
      </DialogActions>
    </div>
  );
}
