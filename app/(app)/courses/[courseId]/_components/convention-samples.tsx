import { ChordName } from '@/components/marking/chord-name';
import type { Framed } from '@/lib/marking/key-reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths } from '@/lib/theory/pitch';
import type { Mode } from '@/lib/theory/key';

/** Chords that the sheets print differently, as the default sheet spells them. */
const SAMPLES: readonly { readonly what: string; readonly text: string; readonly mode: Mode }[] = [
  { what: 'cadential six-four', text: 'Cad64', mode: 'major' },
  { what: 'dominant seventh of the dominant, first inversion', text: 'V65/V', mode: 'major' },
  { what: 'leading-tone seventh of the dominant', text: 'viio7/V', mode: 'major' },
  { what: 'half-diminished leading-tone seventh', text: 'viiø7', mode: 'major' },
  { what: 'Neapolitan', text: 'N6', mode: 'minor' },
  { what: 'borrowed sixth degree', text: 'bVI', mode: 'major' },
  { what: 'German augmented sixth', text: 'Ger65', mode: 'minor' },
  { what: 'supertonic, first inversion', text: 'ii6', mode: 'major' },
];

/** What a convention sheet looks like in print. */
export function ConventionSamples({ sheet }: { readonly sheet: ConventionSheet }) {
  return (
    <dl className="grid max-w-3xl gap-x-8 gap-y-1 sm:grid-cols-2">
      {SAMPLES.map(({ what, text, mode }) => (
        <div key={what} className="flex items-baseline justify-between gap-4 border-b border-rule py-1">
          <dt className="text-small text-ink-soft">{what}</dt>
          <dd className="whitespace-nowrap"><Sample text={text} mode={mode} sheet={sheet} /></dd>
        </div>
      ))}
    </dl>
  );
}

function Sample({ text, mode, sheet }: { readonly text: string; readonly mode: Mode; readonly sheet: ConventionSheet }) {
  const numeral = parseNumeral(text, mode);
  if (!numeral.ok) return null;
  const chord: Framed = { key: { tonic: fifths(0), mode }, numeral: numeral.value };
  return <ChordName chord={chord} sheet={sheet} />;
}
