'use client';

import { useState } from 'react';
import { NumeralText } from '@/components/score/numeral-text';
import { Choices, Field, Input, Radio } from '@/components/ui';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { type Key, MODES, type Mode } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths, formatPitchClassForPeople } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { typesetNumeral } from '@/lib/theory/typeset';

/** A numeral typed as a student would: what it means under the sheet, how it is printed, and which notes it spells. */
export function TrySpelling({ sheet }: { readonly sheet: ConventionSheet }) {
  const [text, setText] = useState('I64');
  const [mode, setMode] = useState<Mode>('major');
  const read = text.trim() === '' ? null : parseNumeral(text.trim(), mode, sheet);
  return (
    <div className="mt-5 max-w-md">
      <h3 className="caps mb-2 text-small text-ink-soft">Try it</h3>
      <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
        <Field label="What a student types" error={read && !read.ok ? read.error.message : undefined}>
          <Input value={text} autoComplete="off" spellCheck={false} onChange={(event) => setText(event.target.value)} />
        </Field>
        <Choices legend="In">
          {MODES.map((each) => <Radio key={each} name="try-mode" checked={mode === each} onChange={() => setMode(each)} label={each === 'major' ? 'C major' : 'c minor'} />)}
        </Choices>
      </div>
      <p aria-live="polite" className="mt-2 min-h-8">{read?.ok ? <Meaning numeral={read.value} mode={mode} sheet={sheet} /> : null}</p>
    </div>
  );
}

function Meaning({ numeral, mode, sheet }: { readonly numeral: Numeral; readonly mode: Mode; readonly sheet: ConventionSheet }) {
  const key: Key = { tonic: fifths(0), mode };
  const parts = typesetNumeral(numeral, mode, sheet);
  const notes = spellNumeral(key, numeral).tones.map((tone) => formatPitchClassForPeople(tone.fifths));
  return (
    <>
      is read as {parts.spoken}, printed <span className="text-lead"><NumeralText parts={parts} decorative /></span>, and spells {notes.join(' ')}.
    </>
  );
}
