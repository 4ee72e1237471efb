import { formatKey } from '../theory/key';
import { formatNumeral } from '../theory/numeral-format';
import { formatPitchClass } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';
import type { Annotation } from './annotation';
import { formatRational } from './rational';
import type { Bar, Score } from './score';

const COLUMNS = ['bar', 'onset', 'duration', 'key', 'numeral', 'root', 'bass', 'tones', 'quality', 'inversion'] as const;

/**
 * A table of labels, one per line, in CSV (RFC 4180, UTF-8, CRLF): the bar's printed number, onset from the bar's start
 * and duration in quarters as exact fractions, key and numeral as on the command line, and the notes the label spells.
 * Each label lasts until the next, the last one until `end` (ticks); places without harmony have no line.
 */
export function formatLabelsAsCsv(score: Score, annotations: readonly Annotation[], end: number): string {
  const lines = annotations.flatMap((annotation, i) => {
    const cells = cellsOf(score, annotation, annotations[i + 1]?.start ?? end);
    return cells ? [cells] : [];
  });
  return [COLUMNS, ...lines].map((cells) => `${cells.map(quote).join(',')}\r\n`).join('');
}

function cellsOf(score: Score, { start, key, numeral }: Annotation, end: number): string[] | null {
  if (!numeral) return null;
  const bar = score.bars.findLast((candidate) => candidate.start <= start) ?? (score.bars[0] as Bar);
  const quarters = (ticks: number) => formatRational({ num: ticks, den: score.ticksPerQuarter });
  const { tones, root, bass } = spellNumeral(key, numeral);
  return [
    bar.number,
    quarters(start - bar.start),
    quarters(end - start),
    formatKey(key),
    formatNumeral(numeral, key.mode),
    formatPitchClass(root),
    formatPitchClass(bass),
    tones.map((tone) => formatPitchClass(tone.fifths)).join(' '),
    numeral.quality,
    String(numeral.inversion),
  ];
}

/** A bar number comes from the uploaded file: one that a spreadsheet would take for a formula is made plain text. */
function quote(cell: string): string {
  const safe = /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
