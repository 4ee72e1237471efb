import { type Score } from '../../score/score';
import { prepare } from '../prepare';
import { type Slices } from '../slices';
import { type Weights } from '../weights';
import { alignGold, goldChords, goldKeys } from './gold';
import { type TrainingItem } from './learn';
import { type ReferenceLabel } from './reference';

export interface AnalysedMusic {
  readonly slug: string;
  readonly score: Score;
  readonly slices: Slices;
  readonly reference: readonly ReferenceLabel[];
}

/** An analysed score made ready for training: the reference's chords and keys are among those weighed. */
export function trainingItem(item: AnalysedMusic, choosing: Weights): TrainingItem {
  const gold = alignGold(item.slices, item.reference);
  const prepared = prepare(item.score, choosing, { wantedChords: goldChords(gold), wantedKeys: goldKeys(gold) });
  return { name: item.slug, prepared, gold };
}
