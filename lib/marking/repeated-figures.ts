import type { Mode } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { formatNumeralPlain } from '../theory/numeral-format';
import { parseNumeral } from '../theory/numeral-parse';
import { triadOf } from './quality';

interface Figures {
  readonly seventh: boolean;
  readonly inversion: Numeral['inversion'];
}

// Source: Open Music Theory v1 (CC BY-SA 4.0), figures of triads and sevenths; references §1.
const FIGURES: Readonly<Record<string, Figures>> = {
  '53': { seventh: false, inversion: 0 },
  '6': { seventh: false, inversion: 1 },
  '63': { seventh: false, inversion: 1 },
  '64': { seventh: false, inversion: 2 },
  '7': { seventh: true, inversion: 0 },
  '65': { seventh: true, inversion: 1 },
  '43': { seventh: true, inversion: 2 },
  '42': { seventh: true, inversion: 3 },
  '2': { seventh: true, inversion: 3 },
};

/**
 * A label that is figures alone, after a label with a numeral: the same numeral with these figures. After V, `6/5` is
 * V6/5; after a cadential six-four, `5/3` and `7` are the dominant it resolves to. Null when the text is anything else.
 */
export function readRepeatedFigures(text: string, previous: Numeral | null, mode: Mode): Numeral | null {
  const figures = /^[2-7](?:[/-]?[2-6])?$/u.test(text) ? FIGURES[text.replace(/[/-]/gu, '')] : undefined;
  if (!figures || !previous || previous.special === 'common-tone' || previous.special === 'pedal-tone') return null;
  if (previous.special === 'cadential-six-four') return resolution(figures, previous.applied);
  const triad = triadOf(previous.quality);
  if (!triad) return null;
  const isSeventh = triad !== previous.quality;
  const special = previous.special === 'neapolitan' ? previous.special : null;
  const plain: Numeral = { ...previous, special, added: [], inversion: figures.inversion };
  if (!figures.seventh) return { ...plain, quality: triad };
  return isSeventh ? plain : withItsSeventh({ ...plain, quality: triad, inversion: 0 }, figures, mode);
}

/** V or V7 in root position, where the six-four goes. */
function resolution({ seventh, inversion }: Figures, applied: Numeral['applied']): Numeral | null {
  if (inversion !== 0) return null;
  return { degree: { step: 5, alter: 0 }, quality: seventh ? 'dominant-seventh' : 'major', inversion, applied, special: null, added: [] };
}

/** The seventh that the triad has in its key, as if it had been typed out. */
function withItsSeventh(triad: Numeral, { inversion }: Figures, mode: Mode): Numeral | null {
  const head = formatNumeralPlain({ ...triad, applied: [] }, triad.applied[0]?.mode ?? mode);
  const read = parseNumeral(`${head}7`, triad.applied[0]?.mode ?? mode);
  return read.ok ? { ...read.value, applied: triad.applied, inversion } : null;
}

