'use client';

import { NumeralText } from '@/components/score/numeral-text';
import { matchChord, nameTones } from './match-chord';
import { speakCertainty, spellForPeople } from './label-words';
import type { Label, OtherReading } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { equalKeys, formatKeyForPeople } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';

interface OthersPanelProps {
  readonly score: Score;
  readonly label: Label;
  readonly sheet: ConventionSheet;
  onChoose?: ((other: OtherReading) => void) | undefined;
}

/** The engine's other readings of the span, numbered as the keyboard chooses them. */
export function OthersPanel({ score, label, sheet, onChoose }: OthersPanelProps) {
  if (label.others.length === 0) return <p className="text-ink-soft">No other reading was weighed for this span.</p>;
  return (
    <ol className="flex flex-col">
      {label.others.slice(0, 9).map((other, i) => (
        <li key={`${other.key.tonic} ${other.key.mode} ${JSON.stringify(other.numeral)}`} className="border-b border-rule">
          <OtherRow score={score} label={label} sheet={sheet} other={other} place={i + 1} onChoose={onChoose} />
        </li>
      ))}
    </ol>
  );
}

function OtherRow({ score, label, sheet, other, place, onChoose }: OthersPanelProps & { readonly other: OtherReading; readonly place: number }) {
  const parts = typesetNumeral(other.numeral, other.key.mode, sheet);
  const { leftOver } = matchChord(score, label.start, label.end, other.key, other.numeral);
  const elsewhere = !equalKeys(other.key, label.key);
  const content = (
    <>
      <span className="tabular w-5 shrink-0 text-ink-soft">{place}</span>
      <span className="min-w-0 flex-1">
        <span className="flex flex-wrap items-baseline gap-x-2">
          <span className="text-lead"><NumeralText parts={parts} /></span>
          {elsewhere ? <span className="text-small">in {formatKeyForPeople(other.key)}</span> : null}
          <span className="text-small text-ink-soft">{speakCertainty(other.certainty)}</span>
        </span>
        <span className="block text-small text-ink-soft">
          {spellForPeople(other.key, other.numeral).join(' ')}
          {leftOver.length > 0 ? ` · leaves over ${nameTones(leftOver)}` : ' · explains every note'}
        </span>
      </span>
    </>
  );
  if (!onChoose) return <div className="flex items-baseline gap-2 px-1 py-2">{content}</div>;
  return (
    <button type="button" className="flex w-full items-baseline gap-2 px-1 py-2 text-left hover:bg-bench" onClick={() => onChoose(other)}>
      {content}
    </button>
  );
}
