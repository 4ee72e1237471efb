'use client';

import { NumeralText } from '@/components/score/numeral-text';
import { Button, Choices, Radio } from '@/components/ui';
import { askedLabels, type PrintOptions } from '@/lib/handout/print-options';
import type { Label } from '@/lib/harmony/reading';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { typesetNumeral } from '@/lib/theory/typeset';
import type { HandoutForm } from './handout-editor';

interface AskedChoicesProps {
  readonly form: HandoutForm;
  readonly labels: readonly Label[];
  readonly bars: readonly { readonly number: string; readonly start: number }[];
  readonly conventions: ConventionSheet | null;
  readonly onChange: (part: Partial<HandoutForm>) => void;
}

const WORDS: readonly (readonly [PrintOptions['asked'], string])[] = [
  ['all', 'Every label'],
  ['applied', 'Applied chords'],
  ['sevenths', 'Seventh chords'],
  ['chosen', 'Those I choose'],
];

/** Which spans get a blank. Choosing by hand starts from what was asked before. */
export function AskedChoices({ form, labels, bars, conventions, onChange }: AskedChoicesProps) {
  const choose = (asked: PrintOptions['asked']) =>
    onChange(asked === 'chosen' && form.asked !== 'chosen' ? { asked, chosen: [...askedLabels(labels, form)] } : { asked });
  const toggle = (id: string) =>
    onChange({ chosen: form.chosen.includes(id) ? form.chosen.filter((each) => each !== id) : [...form.chosen, id] });
  return (
    <div>
      <Choices legend="Ask for">
        {WORDS.map(([asked, word]) => (
          <Radio key={asked} name="asked" label={word} checked={form.asked === asked} onChange={() => choose(asked)} />
        ))}
      </Choices>
      {form.asked === 'chosen' ? (
        <ol className="mt-3 max-h-72 overflow-y-auto border-y border-rule" aria-label="Spans to ask for, by bar">
          {groupByBar(labels, bars).map(([bar, inBar], row) => (
            <li key={row} className="flex items-baseline gap-3 border-b border-rule px-1 py-1 last:border-b-0">
              <span className="tabular w-8 shrink-0 text-right text-small text-ink-soft">{bar}</span>
              <span className="flex flex-wrap gap-1">
                {inBar.map((label) => (
                  <SpanToggle key={label.id} label={label} sheet={conventions ?? DEFAULT_CONVENTIONS} pressed={form.chosen.includes(label.id)} onToggle={() => toggle(label.id)} />
                ))}
              </span>
            </li>
          ))}
        </ol>
      ) : null}
    </div>
  );
}

interface SpanToggleProps {
  readonly label: Label;
  readonly sheet: ConventionSheet;
  readonly pressed: boolean;
  readonly onToggle: () => void;
}

function SpanToggle({ label, sheet, pressed, onToggle }: SpanToggleProps) {
  return (
    <Button kind={pressed ? 'primary' : 'plain'} size="small" aria-pressed={pressed} onClick={onToggle}>
      {label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} /> : 'blank'}
    </Button>
  );
}

function groupByBar(labels: readonly Label[], bars: AskedChoicesProps['bars']): (readonly [string, readonly Label[]])[] {
  return bars.flatMap((bar, i) => {
    const end = bars[i + 1]?.start ?? Infinity;
    const inBar = labels.filter((label) => label.start >= bar.start && label.start < end);
    return inBar.length > 0 ? [[bar.number, inBar] as const] : [];
  });
}
