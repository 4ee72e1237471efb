'use client';

import { Checkbox, Choices, Field, Radio, Select } from '@/components/ui';
import { PAPERS, type PrintOptions, STAFF_SIZES } from '@/lib/handout/print-options';
import type { HandoutForm } from './handout-editor';

interface PaperChoicesProps {
  readonly form: HandoutForm;
  readonly onKind: (kind: PrintOptions['kind']) => void;
  readonly onChange: (part: Partial<HandoutForm>) => void;
}

const STAFF_WORDS: Readonly<Record<PrintOptions['staffSize'], string>> = { small: 'Small', normal: 'Normal', large: 'Large' };

/** Worksheet or key, paper, size of the music, keys. */
export function PaperChoices({ form, onKind, onChange }: PaperChoicesProps) {
  return (
    <>
      <Choices legend="Print">
        <Radio name="kind" label="Worksheet" hint="Blanks under the asked spans" checked={form.kind === 'worksheet'} onChange={() => onKind('worksheet')} />
        <Radio name="kind" label="Key" hint="Every label" checked={form.kind === 'key'} onChange={() => onKind('key')} />
      </Choices>
      <div className="grid grid-cols-2 gap-4">
        <Field label="Paper">
          <Select value={form.paper} onChange={(event) => onChange({ paper: event.target.value as PrintOptions['paper'] })}>
            {PAPERS.map((paper) => <option key={paper}>{paper}</option>)}
          </Select>
        </Field>
        <Field label="Music">
          <Select value={form.staffSize} onChange={(event) => onChange({ staffSize: event.target.value as PrintOptions['staffSize'] })}>
            {STAFF_SIZES.map((size) => <option key={size} value={size}>{STAFF_WORDS[size]}</option>)}
          </Select>
        </Field>
      </div>
      {form.kind === 'worksheet' ? (
        <Checkbox label="Print the keys" hint="Otherwise the sheet asks for the key at its start" checked={form.keysGiven} onChange={(event) => onChange({ keysGiven: event.target.checked })} />
      ) : null}
    </>
  );
}
