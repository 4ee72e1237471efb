import type { Framed } from '@/lib/marking/key-reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { ChordName } from './chord-name';

interface LabelFeedbackProps {
  readonly reasons: readonly string[];
  readonly remark: string | null;
  /** The key's label first, then what is accepted beside it; null while the key is not shown. */
  readonly keyed: readonly Framed[] | null;
  readonly sheet: ConventionSheet;
  readonly keyShown: boolean;
}

/** What is said about one label: the reasons, the marker's remark, the key where it is shown. */
export function LabelFeedback({ reasons, remark, keyed, sheet, keyShown }: LabelFeedbackProps) {
  const [own, ...beside] = keyed ?? [];
  return (
    <div className="flex flex-col gap-1.5">
      {reasons.map((reason) => <p key={reason}>{reason}</p>)}
      {remark ? <p className="border-l-2 border-ochre pl-3 font-book whitespace-pre-line">{remark}</p> : null}
      {own ? (
        <p className="flex flex-wrap items-baseline gap-x-2">
          <span className="caps text-small text-ink-soft">Key</span>
          <ChordName chord={own} sheet={sheet} keyShown={keyShown} />
          {beside.length > 0 ? <span className="text-small text-ink-soft">also</span> : null}
          {beside.map((chord, place) => <ChordName key={place} chord={chord} sheet={sheet} keyShown={keyShown} />)}
        </p>
      ) : null}
    </div>
  );
}
