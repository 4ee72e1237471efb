import { keyOfNumeral } from '../../theory/applied';
import { type Degree, type Mode, fifthsOfDegree } from '../../theory/key';
import { type Numeral, type Target } from '../../theory/numeral';
import { type Quality } from '../../theory/chord';
import { fifths, parsePitchClass } from '../../theory/pitch';
import { type Score } from '../../score/score';
import { keyNumber } from '../key-terms';
import { findKind } from '../templates';
import { findLabel } from '../vocabulary';

/** A label of an analysed score in the engine's terms. Times in ticks. `label` is −1 for what the vocabulary lacks. */
export interface ReferenceLabel {
  readonly start: number;
  readonly end: number;
  readonly key: number;
  readonly label: number;
  readonly inversion: number;
  /** Root on the line of fifths. */
  readonly root: number;
  readonly kind: number;
}

/** The report contract, as far as training reads it. */
export interface ReportLabel {
  readonly measure: number;
  readonly onset: string;
  readonly duration: string;
  readonly key: { readonly tonic: string; readonly mode: Mode };
  readonly quality: Quality;
  readonly inversion: number;
  readonly degree: { readonly step: number; readonly alter: number };
  readonly applied: { readonly step: number; readonly alter: number; readonly mode: Mode } | null;
}

export interface Report {
  readonly labels: readonly ReportLabel[];
}

function parseQuarters(text: string): number {
  const [numerator, denominator] = text.split('/');
  return Number(numerator) / Number(denominator ?? 1);
}

export function readReference(report: Report, score: Score): readonly ReferenceLabel[] {
  return report.labels.flatMap((label) => {
    const tonic = parsePitchClass(label.key.tonic);
    const bar = score.bars[label.measure];
    if (!tonic.ok || !bar) return [];
    const start = bar.start + parseQuarters(label.onset) * score.ticksPerQuarter;
    const end = start + parseQuarters(label.duration) * score.ticksPerQuarter;
    return [{ start, end, key: keyNumber(tonic.value, label.key.mode === 'major' ? 0 : 1), ...readChord(label, tonic.value) }];
  });
}

function readChord(label: ReportLabel, tonic: number): Pick<ReferenceLabel, 'label' | 'inversion' | 'root' | 'kind'> {
  const { key, quality, inversion } = label;
  const degree = label.degree as Degree;
  const applied: Target[] = label.applied ? [{ degree: label.applied as Degree, mode: label.applied.mode }] : [];
  const id = findLabel(key.mode, { degree, quality, inversion: inversion as Numeral['inversion'], applied });
  const frame = keyOfNumeral({ tonic: fifths(tonic), mode: key.mode }, { applied });
  return { label: id, inversion, root: fifthsOfDegree(frame, degree), kind: findKind(quality) };
}
