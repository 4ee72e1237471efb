'use client';

import { Button, Dialog, DialogActions } from '@/components/ui';
import { NumeralText } from '@/components/score/numeral-text';
import { namePlace } from '@/components/score/beats';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { formatKeyForPeople } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';
import type { Conflict } from './desk-state';

interface ConflictDialogProps {
  readonly conflict: Conflict;
  readonly score: Score;
  readonly sheet: ConventionSheet;
  onTakeTheirs(): void;
  onPutMine(): void;
  /** Closed without a choice: it can be made later, from the toolbar. */
  onPutOff(): void;
}

/** Someone saved the same labels first: both are shown, and one is chosen. Nothing is lost until then. */
export function ConflictDialog({ conflict, score, sheet, onTakeTheirs, onPutMine, onPutOff }: ConflictDialogProps) {
  const { edit, theirs } = conflict;
  const mine = edit.change.labels.after;
  const start = Math.min(...mine.map((l) => l.start));
  const end = Math.max(...mine.map((l) => l.end));
  const saved = theirs.labels.filter((l) => l.start < end && l.end > start);
  return (
    <Dialog open={!conflict.putOff} onOpenChange={(open) => !open && onPutOff()} title="Two versions of the same place" description="Another window or person saved these labels while you were writing. Your edit is kept here and nothing is sent until you choose which one stands.">
      <div className="grid gap-4 sm:grid-cols-2">
        <Side title="Saved meanwhile" labels={saved} score={score} sheet={sheet} />
        <Side title={`Yours: ${edit.words}`} labels={mine} score={score} sheet={sheet} />
      </div>
      <DialogActions>
        <Button onClick={onTakeTheirs}>Keep what was saved</Button>
        <Button kind="primary" onClick={onPutMine}>Put mine in its place</Button>
      </DialogActions>
    </Dialog>
  );
}

function Side({ title, labels, score, sheet }: { readonly title: string; readonly labels: readonly Label[]; readonly score: Score; readonly sheet: ConventionSheet }) {
  return (
    <section>
      <h3 className="caps mb-1 border-b border-rule text-small text-ink-soft">{title}</h3>
      <ul className="flex flex-col gap-1">
        {labels.map((label) => (
          <li key={label.id} className="flex flex-wrap items-baseline gap-x-2">
            <span className="text-lead">{label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} /> : 'blank'}</span>
            <span className="text-small">{formatKeyForPeople(label.key)}</span>
            <span className="text-small text-ink-soft">{namePlace(score, label.start)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
