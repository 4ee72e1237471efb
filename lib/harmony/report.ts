import { rational } from '../score/rational';
import { type Bar, type Score } from '../score/score';
import { reduceApplied } from '../theory/applied';
import { qualityInReport } from '../theory/chord';
import { formatNumeralPlain } from '../theory/numeral-format';
import { formatPitchClass } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';
import { type Label, type Reading } from './reading';

/** The report contract of the analysis scorer; times in quarters as fractions (`4/3`). */
export interface AnalysisReport {
  readonly measures: readonly { readonly index: number; readonly number: string; readonly start: string; readonly length: string }[];
  readonly labels: readonly LabelReport[];
}

interface LabelReport {
  readonly measure: number;
  readonly onset: string;
  readonly duration: string;
  readonly key: { readonly tonic: string; readonly mode: string };
  readonly numeral: string;
  readonly root: string;
  readonly bass: string;
  readonly quality: string;
  readonly inversion: number;
  readonly degree: { readonly step: number; readonly alter: number };
  readonly applied: { readonly step: number; readonly alter: number; readonly mode: string } | null;
  readonly special: string | null;
  readonly certainty: number | null;
}

/** The reading as a report. Blank labels (no numeral) are left out: their time counts as not analysed. */
export function reportOf(score: Score, reading: Reading): AnalysisReport {
  const quarters = (ticks: number) => formatQuarters(ticks, score.ticksPerQuarter);
  return {
    measures: score.bars.map((bar) => ({ index: bar.index, number: bar.number, start: quarters(bar.start), length: quarters(bar.length) })),
    labels: reading.labels.flatMap((label) => reportLabel(label, score.bars, quarters)),
  };
}

function formatQuarters(ticks: number, ticksPerQuarter: number): string {
  const { num, den } = rational(ticks, ticksPerQuarter);
  return den === 1 ? `${num}` : `${num}/${den}`;
}

function reportLabel(label: Label, bars: readonly Bar[], quarters: (ticks: number) => string): readonly LabelReport[] {
  const { key, numeral } = label;
  const bar = bars.findLast(({ start }) => start <= label.start);
  if (!numeral || !bar) return [];
  const { root, bass } = spellNumeral(key, numeral);
  const { degree, applied } = reduceApplied(numeral, key.mode);
  const isNamed = numeral.special === 'cadential-six-four' || numeral.special === 'neapolitan';
  return [
    {
      measure: bar.index,
      onset: quarters(label.start - bar.start),
      duration: quarters(label.end - label.start),
      key: { tonic: formatPitchClass(key.tonic), mode: key.mode },
      numeral: formatNumeralPlain(numeral, key.mode),
      root: formatPitchClass(root),
      bass: formatPitchClass(bass),
      quality: qualityInReport(numeral.quality),
      inversion: Math.min(3, numeral.inversion),
      degree,
      applied: applied ? { ...applied.degree, mode: applied.mode } : null,
      special: isNamed ? numeral.special : null,
      certainty: label.certainty === null ? null : Math.round(label.certainty * 1000) / 1000,
    },
  ];
}
