'use client';

import { type FormEvent, useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { ChordName } from '@/components/marking/chord-name';
import { spellForPeople } from '@/components/reading/label-words';
import { parseWritten } from '@/components/reading/written';
import { Button, Field, Input } from '@/components/ui';
import type { Label } from '@/lib/harmony/reading';
import type { Framed } from '@/lib/marking/key-reading';
import { signFramed } from '@/lib/marking/frame';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { accept, drop } from '../../actions';
import type { EditedAssignment } from './edited-assignment';

interface AlternativesProps {
  readonly assignment: EditedAssignment;
  readonly label: Label;
  readonly alternatives: readonly Framed[];
  readonly mayChange: boolean;
}

/** What is right beside the key's label: typed, or taken from the program's other readings. */
export function Alternatives({ assignment, label, alternatives, mayChange }: AlternativesProps) {
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  const [busy, act] = useAct();
  const at = { assignmentId: assignment.id, startTick: label.start };
  const take = (chord: Framed) => act(() => accept({ ...at, chord }), 'Accepted beside the key.');
  const isKnown = (chord: Framed) => [...alternatives, { key: label.key, numeral: label.numeral as Framed['numeral'] }].some((one) => signFramed(one) === signFramed(chord));
  const others = label.others.filter((other) => !isKnown(other)).slice(0, 4);
  return (
    <section aria-label="Accepted alternatives">
      <h3 className="mb-1 text-small font-medium">Also right</h3>
      {alternatives.length > 0 ? (
        <ul className="divide-y divide-rule border-y border-rule">
          {alternatives.map((chord) => (
            <li key={signFramed(chord)} className="flex items-center justify-between gap-3 py-1">
              <ChordName chord={chord} sheet={sheet} keyShown />
              {mayChange ? <Button size="small" kind="quiet" busy={busy} onClick={() => void act(() => drop({ ...at, chord }), 'No longer accepted.')}>Take away</Button> : null}
            </li>
          ))}
        </ul>
      ) : (
        <p className="text-small text-ink-soft">Only the key’s label.</p>
      )}
      {mayChange ? <TypedAlternative label={label} sheet={sheet} busy={busy} onTake={take} /> : null}
      {mayChange && others.length > 0 ? (
        <div className="mt-3">
          <p className="text-micro text-ink-soft">Other readings of the program:</p>
          <p className="mt-1 flex flex-wrap gap-2">
            {others.map((other) => (
              <Button key={signFramed(other)} size="small" busy={busy} onClick={() => void take({ key: other.key, numeral: other.numeral })}>
                <ChordName chord={other} sheet={sheet} keyShown={other.key.tonic !== label.key.tonic || other.key.mode !== label.key.mode} />
              </Button>
            ))}
          </p>
        </div>
      ) : null}
    </section>
  );
}

interface TypedProps {
  readonly label: Label;
  readonly sheet: typeof DEFAULT_CONVENTIONS;
  readonly busy: boolean;
  onTake(chord: Framed): Promise<boolean>;
}

function TypedAlternative({ label, sheet, busy, onTake }: TypedProps) {
  const [text, setText] = useState('');
  const read = parseWritten(text, label.key, sheet);
  const chord: Framed | null = read.ok && read.value.numeral ? { key: read.value.key ?? label.key, numeral: read.value.numeral } : null;
  const submit = async (event: FormEvent) => {
    event.preventDefault();
    if (chord && (await onTake(chord))) setText('');
  };
  return (
    <form onSubmit={(event) => void submit(event)} className="mt-3">
      <Field label="Accept also" error={text !== '' && !read.ok ? read.error.message : undefined} hint={chord ? `Spells ${spellForPeople(chord.key, chord.numeral).join(' ')}` : 'A numeral; with another key: G: V7'}>
        <span className="flex gap-2">
          <Input value={text} onChange={(event) => setText(event.target.value)} autoComplete="off" autoCapitalize="off" spellCheck={false} className="max-w-36" aria-label="Accept also" />
          <Button type="submit" busy={busy} disabled={!chord}>Accept</Button>
        </span>
      </Field>
    </form>
  );
}
