import { KeyName, NumeralText } from '@/components/score/numeral-text';
import type { Framed } from '@/lib/marking/key-reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { typesetNumeral } from '@/lib/theory/typeset';

interface ChordNameProps {
  readonly chord: Framed;
  readonly sheet: ConventionSheet;
  /** The key is printed before the numeral: where it is not plain from what stands around. */
  readonly keyShown?: boolean;
}

/** A numeral as the course prints it, with its key where that is asked for. */
export function ChordName({ chord, sheet, keyShown = false }: ChordNameProps) {
  return (
    <span className="whitespace-nowrap">
      {keyShown ? <span className="font-book text-small text-ink-soft italic"><KeyName keyValue={chord.key} />:{' '}</span> : null}
      <NumeralText parts={typesetNumeral(chord.numeral, chord.key.mode, sheet)} className="text-lead" />
    </span>
  );
}
