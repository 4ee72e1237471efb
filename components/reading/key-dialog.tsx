'use client';

import { useState } from 'react';
import { Button, Choices, Dialog, DialogActions, Field, Input, Radio } from '@/components/ui';
import { NumeralText } from '@/components/score/numeral-text';
import type { EditResult } from '@/lib/harmony/edit';
import { type KeyChangeKeeps, changeKeyFrom, removeRegion } from '@/lib/harmony/edit-keys';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { formatKeyForPeople, parseKey } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';

interface KeyDialogProps {
  readonly reading: Reading;
  /** The label the new key begins with. */
  readonly label: Label;
  readonly place: string;
  readonly sheet: ConventionSheet;
  onEdit(result: EditResult, words: string): void;
  onClose(): void;
}

/** Changes the key from a label to the next change of key, with what becomes of the labels shown beforehand. */
export function KeyDialog({ reading, label, place, sheet, onEdit, onClose }: KeyDialogProps) {
  const [text, setText] = useState('');
  const [keeps, setKeeps] = useState<KeyChangeKeeps>('sound');
  const key = parseKey(text);
  const result = key.ok ? changeKeyFrom(reading, label.start, key.value, keeps) : null;
  const begins = reading.regions.some((r) => r.start === label.start && r.start > reading.start);
  const apply = () => {
    if (!key.ok || !result) return;
    onEdit(result, `${formatKeyForPeople(key.value)} from ${place}.`);
    onClose();
  };
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} title={`The key from ${place}`} description={`Now ${formatKeyForPeople(label.key)}. The new key holds until the next change.`}>
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          apply();
        }}
      >
        <Field label="New key" hint="A capital is major, a small letter minor: E♭ or Eb, c♯ or c#, or written out." error={text !== '' && !key.ok ? key.error.message : undefined}>
          <Input value={text} autoFocus autoComplete="off" spellCheck={false} onChange={(event) => setText(event.target.value)} />
        </Field>
        <Choices legend="What stays of the labels there">
          <Radio name="keeps" checked={keeps === 'sound'} onChange={() => setKeeps('sound')} label="The chords: their numerals are read in the new key" />
          <Radio name="keeps" checked={keeps === 'numerals'} onChange={() => setKeeps('numerals')} label="The numerals: they then spell other chords" />
        </Choices>
        {result?.ok ? <Preview before={reading} after={result.value.reading} sheet={sheet} /> : null}
        <DialogActions>
          {begins ? (
            <Button
              kind="quiet"
              onClick={() => {
                onEdit(removeRegion(reading, label.start, keeps), 'Took the change of key away.');
                onClose();
              }}
            >
              Take this change of key away
            </Button>
          ) : null}
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" kind="primary" disabled={!result?.ok}>Change the key</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}

const SHOWN = 12;

/** The first labels that change, before and after. */
function Preview({ before, after, sheet }: { readonly before: Reading; readonly after: Reading; readonly sheet: ConventionSheet }) {
  const changed = after.labels.flatMap((label) => {
    const was = before.labels.find((b) => b.id === label.id);
    return was?.numeral && label.numeral && was.key !== label.key ? [{ was, label }] : [];
  });
  if (changed.length === 0) return <p className="text-small text-ink-soft">No label changes.</p>;
  return (
    <div className="text-small">
      <p className="mb-1 text-ink-soft">{changed.length === 1 ? 'One label is read anew:' : `${changed.length} labels are read anew:`}</p>
      <ul className="flex flex-wrap gap-x-5 gap-y-1">
        {changed.slice(0, SHOWN).map(({ was, label }) => (
          <li key={label.id} className="flex items-baseline gap-1.5 text-base">
            {was.numeral ? <NumeralText parts={typesetNumeral(was.numeral, was.key.mode, sheet)} /> : null}
            <span aria-label="becomes" role="img" className="text-ink-soft">→</span>
            {label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} /> : null}
          </li>
        ))}
        {changed.length > SHOWN ? <li>…</li> : null}
      </ul>
    </div>
  );
}
