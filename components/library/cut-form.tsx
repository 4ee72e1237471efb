'use client';

import { type FormEvent, useState } from 'react';
import { Button, Field, Input } from '@/components/ui';
import { type BarRange, type PrintedBar, findBar, formatBar } from './bar-range';

export interface Cut extends BarRange {
  readonly title: string;
  readonly purpose: string;
}

interface CutFormProps {
  readonly bars: readonly PrintedBar[];
  readonly scoreTitle: string;
  readonly range: BarRange;
  readonly onRange: (range: BarRange) => void;
  readonly busy: boolean;
  readonly onCut: (cut: Cut) => void;
}

/** From bar, to bar, title, purpose. The bars can be typed here or picked on the score below. */
export function CutForm({ bars, scoreTitle, range, onRange, busy, onCut }: CutFormProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const proposed = `${scoreTitle}, ${range.first === range.last ? 'bar' : 'bars'} ${barsText(bars, range)}`.slice(0, 300);
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const purpose = new FormData(event.currentTarget).get('purpose');
    onCut({ ...range, title: (typed ?? proposed).trim() || proposed, purpose: typeof purpose === 'string' ? purpose : '' });
  };
  return (
    <form onSubmit={submit} aria-label="Cut an excerpt" className="grid grid-cols-2 items-end gap-x-3 gap-y-2 border-y border-rule-strong bg-paper py-3 sm:grid-cols-[6rem_6rem_minmax(0,1fr)] xl:grid-cols-[5.5rem_5.5rem_minmax(0,1fr)_minmax(0,1fr)_auto]">
      <BarField label="From bar" bars={bars} index={range.first} onBar={(first) => onRange({ first, last: Math.max(first, range.last) })} />
      <BarField label="To bar" bars={bars} index={range.last} from={range.first} onBar={(last) => onRange({ first: Math.min(range.first, last), last })} />
      <Field label="Title" className="col-span-2 sm:col-span-1">
        <Input value={typed ?? proposed} maxLength={300} onChange={(event) => setTyped(event.target.value)} />
      </Field>
      <Field label="What it is for" className="col-span-2 sm:col-span-3 xl:col-span-1">
        <Input name="purpose" maxLength={2000} placeholder="Applied sevenths before a half cadence" />
      </Field>
      <Button type="submit" kind="primary" busy={busy} busyText="Cutting" className="col-span-2 sm:col-span-1">Cut the excerpt</Button>
    </form>
  );
}

function barsText(bars: readonly PrintedBar[], { first, last }: BarRange): string {
  return first === last ? formatBar(bars, first) : `${formatBar(bars, first)}–${formatBar(bars, last)}`;
}

interface BarFieldProps {
  readonly label: string;
  readonly bars: readonly PrintedBar[];
  readonly index: number;
  readonly from?: number;
  readonly onBar: (index: number) => void;
}

/** Takes a printed number when the field is left; says so when the score has no such bar. */
function BarField({ label, bars, index, from, onBar }: BarFieldProps) {
  const [text, setText] = useState(formatBar(bars, index));
  const [shown, setShown] = useState(index);
  // Picked on the score, or moved by the other field: what is typed here gives way.
  if (shown !== index) {
    setShown(index);
    setText(formatBar(bars, index));
  }
  const found = findBar(bars, text, from);
  return (
    <Field label={label} error={found === null ? 'No such bar' : undefined}>
      <Input
        value={text}
        inputMode="text"
        autoComplete="off"
        onChange={(event) => setText(event.target.value)}
        onBlur={() => found !== null && found !== index && onBar(found)}
        onKeyDown={(event) => event.key === 'Enter' && found !== null && found !== index && (event.preventDefault(), onBar(found))}
      />
    </Field>
  );
}
