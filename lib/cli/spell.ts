import { keyOfNumeral } from '../theory/applied';
import { figuresOf, sizeOf } from '../theory/chord';
import { type Key, formatKey, parseKey } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { parseNumeral } from '../theory/numeral-parse';
import { formatPitchClass } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';

const USAGE = `usage: npm run --silent spell -- KEY NUMERAL…
KEY      Eb major, c# minor (one argument or two); Eb and c# alone are major and minor
NUMERAL  V7, ii65, vii°7/V (viio7/V), It6, Fr43, Ger65, N6, CT°7, Cad64 …
Prints a line per numeral: the notes from the bass up, root, quality, figures.
Exit status: 0 all read, 1 a numeral could not be read, 2 wrong usage.`;

/** KEY in one argument or two, and what is left. */
function findKey(args: readonly string[]): { key: Key; numerals: readonly string[] } | null {
  for (const taken of [2, 1]) {
    const key = args.length >= taken ? parseKey(args.slice(0, taken).join(' ')) : null;
    if (key?.ok) return { key: key.value, numerals: args.slice(taken) };
  }
  return null;
}

/** One line, columns parted by tabs: the numeral as typed, notes, root, quality, figures, and the key it is read in when applied. */
function spellLine(key: Key, text: string): { line: string; ok: boolean } {
  const numeral = parseNumeral(text, key.mode);
  if (!numeral.ok) return { line: `${text}\tcannot be read. ${numeral.error.message}`, ok: false };
  const chord = spellNumeral(key, numeral.value);
  const notes = chord.tones.map((tone) => formatPitchClass(tone.fifths)).join(' ');
  const frame = numeral.value.applied.length > 0 ? [`in ${formatKey(keyOfNumeral(key, numeral.value))}`] : [];
  const columns = [text, notes, `root ${formatPitchClass(chord.root)}`, numeral.value.quality, figuresText(numeral.value), ...frame];
  return { line: columns.join('\t'), ok: true };
}

/** As printed, with the 5/3 that a triad in root position leaves out; a dash for a single tone. */
function figuresText({ quality, inversion }: Numeral): string {
  const printed = figuresOf(quality, inversion).join('/');
  if (printed !== '') return printed;
  return sizeOf(quality) === 3 ? '5/3' : '-';
}

/** Runs the command; gives the exit status. */
export function spell(args: readonly string[], print: (line: string) => void, complain: (line: string) => void): 0 | 1 | 2 {
  const found = findKey(args);
  if (!found || found.numerals.length === 0) {
    complain(found || args.length === 0 ? USAGE : `No key in “${args.slice(0, 2).join(' ')}”.\n${USAGE}`);
    return 2;
  }
  const lines = found.numerals.map((text) => spellLine(found.key, text));
  for (const { line, ok } of lines) (ok ? print : complain)(line);
  return lines.every(({ ok }) => ok) ? 0 : 1;
}

if (process.argv[1] && /[\\/]spell\.ts$/.test(process.argv[1])) {
  process.exitCode = spell(process.argv.slice(2), (line) => console.log(line), (line) => console.error(line));
}
