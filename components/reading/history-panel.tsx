'use client';

import type { Dispatch } from 'react';
import { Button, ErrorNote, SkeletonRows } from '@/components/ui';
import { namePlace } from '@/components/score/beats';
import { NumeralText } from '@/components/score/numeral-text';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { equalKeys, formatKeyForPeople } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';
import type { DeskAction, DeskState } from './desk-state';
import { type History, type PastEdit, useHistory } from './use-history';

interface HistoryPanelProps {
  readonly base: string;
  readonly desk: DeskState;
  readonly dispatch: Dispatch<DeskAction>;
  readonly score: Score;
  readonly sheet: ConventionSheet;
}

/** Every saved edit: who, when, what; the state after any of them can be brought back. */
export function HistoryPanel({ base, desk, dispatch, score, sheet }: HistoryPanelProps) {
  const history = useHistory(base, desk, dispatch);
  if (history.state === 'loading') return <SkeletonRows rows={4} />;
  if (history.state === 'failed') return <ErrorNote title="The history could not be fetched." action={<Button size="small" onClick={history.reload}>Try again</Button>} />;
  if (history.edits.length === 0) return <p className="text-ink-soft">Nothing was changed yet.</p>;
  return (
    <div className="flex flex-col gap-3">
      <ol className="flex flex-col" aria-label="Saved edits, the newest first">
        {history.edits.map((past, i) => (
          <li key={past.version} className="flex flex-col gap-1 border-b border-rule py-2">
            <PastEditView past={past} score={score} sheet={sheet} />
            {i === 0 ? (
              <span className="text-small text-ink-soft">This is how it is now.</span>
            ) : (
              <button type="button" className="link min-h-6 self-start text-small" onClick={() => void history.restore(past.version, `Brought back the state of ${formatWhen(past.at)}.`)}>
                Bring this state back
              </button>
            )}
          </li>
        ))}
      </ol>
      <Foot history={history} />
    </div>
  );
}

function Foot({ history }: { readonly history: History }) {
  if (history.more) return <Button size="small" onClick={history.older}>Older edits</Button>;
  return (
    <button type="button" className="link min-h-6 self-start text-small" onClick={() => void history.restore(0, 'Brought back the beginning.')}>
      Bring back how it began
    </button>
  );
}

const WHEN = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' });

function formatWhen(at: string): string {
  return WHEN.format(new Date(at));
}

function PastEditView({ past, score, sheet }: { readonly past: PastEdit; readonly score: Score; readonly sheet: ConventionSheet }) {
  const first = past.changed[0];
  const start = (first?.after ?? first?.before)?.start;
  return (
    <>
      <p className="text-small text-ink-soft">
        <span className="font-medium text-ink">{past.by ?? 'A former member'}</span> · <time dateTime={past.at}>{formatWhen(past.at)}</time>
      </p>
      <p>
        {past.words || 'Changed the reading.'} {start === undefined ? null : <span className="text-small text-ink-soft">{namePlace(score, start)}</span>}
      </p>
      {past.changed.length > 0 ? (
        <p className="flex flex-wrap items-baseline gap-x-4">
          {past.changed.map(({ before, after }) => (
            <span key={(after ?? before)?.id} className="inline-flex items-baseline gap-1.5">
              <Face label={before} other={after} sheet={sheet} absent="new" />
              <span role="img" aria-label="became" className="text-ink-soft">→</span>
              <Face label={after} other={before} sheet={sheet} absent="gone" />
            </span>
          ))}
          {past.count > past.changed.length ? <span className="text-small text-ink-soft">and {past.count - past.changed.length} more</span> : null}
        </p>
      ) : null}
    </>
  );
}

function Face({ label, other, sheet, absent }: { readonly label: Label | null; readonly other: Label | null; readonly sheet: ConventionSheet; readonly absent: string }) {
  if (!label) return <i className="text-small text-ink-soft">{absent}</i>;
  const key = other && equalKeys(other.key, label.key) ? null : formatKeyForPeople(label.key);
  if (!label.numeral) return <i className="text-small">a blank</i>;
  return (
    <>
      <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} />
      {key && other ? <span className="text-small">in {key}</span> : null}
    </>
  );
}
