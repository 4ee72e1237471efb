'use client';

import { type KeyboardEvent, useId, useRef, useState } from 'react';
import { ShapeIcon } from '@/components/ui';
import { NumeralText } from '@/components/score/numeral-text';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { Numeral } from '@/lib/theory/numeral';
import { formatKeyForPeople } from '@/lib/theory/key';
import { formatNumeralPlain } from '@/lib/theory/numeral-format';
import { typesetNumeral } from '@/lib/theory/typeset';
import { matchChord, nameTones } from './match-chord';
import { type Written, type WrittenError, parseWritten } from './written';

interface NumeralEntryProps {
  readonly label: Label;
  readonly score: Score;
  readonly sheet: ConventionSheet;
  /** The numeral before the label, in the same key: figures alone repeat it. */
  readonly previous: Numeral | null;
  /** What was typed to open it; null opens it with the label's own numeral, selected. */
  readonly typed: string | null;
  /** `onward`: open the next label too (1), the one before (−1), or none (0). */
  onWrite(written: Written, onward: -1 | 0 | 1): void;
  onCancel(): void;
  /** Whether the notes of the score are compared with what is typed; not on a student's desk. */
  readonly compares: boolean;
}

/** The line that is typed into, at its label. It says at every key what the text means, or where it stops making sense. */
export function NumeralEntry({ label, score, sheet, previous, typed, onWrite, onCancel, compares }: NumeralEntryProps) {
  const [text, setText] = useState(() => typed ?? (label.numeral ? formatNumeralPlain(label.numeral, label.key.mode, sheet) : ''));
  const input = useRef<HTMLInputElement>(null);
  const id = useId();
  const read = parseWritten(text, label.key, sheet, previous);

  const commit = (onward: -1 | 0 | 1) => {
    if (read.ok) return onWrite(read.value, onward);
    input.current?.setSelectionRange(read.error.offset, text.length);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    const { key } = event;
    if (key !== 'Enter' && key !== 'Escape' && key !== 'Tab') return;
    event.preventDefault();
    if (key === 'Escape') onCancel();
    else commit(key === 'Enter' ? 0 : event.shiftKey ? -1 : 1);
  };

  return (
    <div ref={bringIntoView} className="flex w-[19rem] max-w-[92vw] flex-col border border-ink bg-sheet text-base text-ink">
      <input
        ref={input}
        // The person has just asked to write here.
        autoFocus
        value={text}
        aria-label={`Numeral, in ${formatKeyForPeople(label.key)}`}
        aria-describedby={`${id}-meaning`}
        aria-invalid={!read.ok}
        autoComplete="off"
        autoCapitalize="off"
        spellCheck={false}
        onFocus={(event) => typed === null && event.target.select()}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={onKeyDown}
        className="w-full bg-transparent px-2.5 py-1.5 font-book text-lead outline-none"
      />
      <div id={`${id}-meaning`} aria-live="polite" className="min-h-[4.6rem] border-t border-rule px-2.5 py-1.5 text-small">
        {read.ok ? <Meaning written={read.value} label={label} score={score} sheet={sheet} compares={compares} /> : <Stop text={text} error={read.error} />}
      </div>
      <div className="flex border-t border-rule text-small">
        <button type="button" className="flex-1 py-1.5 hover:bg-bench" onClick={() => commit(0)}>Write</button>
        <button type="button" className="flex-1 border-l border-rule py-1.5 hover:bg-bench" onClick={() => commit(1)}>Write, next</button>
        <button type="button" className="flex-1 border-l border-rule py-1.5 hover:bg-bench" onClick={onCancel}>Leave</button>
      </div>
    </div>
  );
}

/** What is typed into must be seen whole. */
function bringIntoView(box: HTMLElement | null): void {
  box?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
}

type MeaningProps = Pick<NumeralEntryProps, 'label' | 'score' | 'sheet' | 'compares'> & { readonly written: Written };

function Meaning({ written, label, score, sheet, compares }: MeaningProps) {
  const { numeral } = written;
  const key = written.key ?? label.key;
  if (!numeral) return <p className="text-ink-soft">{written.key ? `${formatKeyForPeople(key)} from here.` : 'Empty: the label becomes a blank.'}</p>;
  const parts = typesetNumeral(numeral, key.mode, sheet);
  const match = matchChord(score, label.start, label.end, key, numeral);
  return (
    <>
      <p className="flex items-baseline gap-2">
        <NumeralText parts={parts} decorative />
        <span>{parts.spoken}{written.key ? `, ${formatKeyForPeople(key)} from here` : ''}</span>
      </p>
      <p>
        <span className="text-ink-soft">Spells </span>
        {match.tones.map((tone, i) => (
          <span key={tone.fifths} className={compares && tone.found === 'no' ? 'text-madder' : undefined}>
            {i > 0 ? ' ' : ''}
            {nameTones([tone.fifths])}
            {compares && tone.found === 'no' ? ' (not there)' : ''}
            {compares && tone.found === 'enharmonic' ? ' (written otherwise)' : ''}
          </span>
        ))}
      </p>
      {compares ? <p className={match.leftOver.length > 0 ? 'text-ochre' : 'text-verdigris'}>{match.leftOver.length > 0 ? `Leaves over ${nameTones(match.leftOver)}` : 'Explains every note'}</p> : null}
    </>
  );
}

function Stop({ text, error }: { readonly text: string; readonly error: WrittenError }) {
  return (
    <>
      <p className="font-book text-base" aria-hidden="true">
        <span>{text.slice(0, error.offset)}</span>
        <span className="bg-madder-wash text-madder underline decoration-wavy underline-offset-4">{text.slice(error.offset) || '\u2009…'}</span>
      </p>
      <p className="flex items-baseline gap-1.5 text-madder">
        <ShapeIcon shape="cross" />
        {error.message}
      </p>
    </>
  );
}
