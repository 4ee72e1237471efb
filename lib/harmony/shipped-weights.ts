import { type WeightTable, readWeights } from './weight-table';
import { type Weights } from './weights';
import table from './weights.json';

let read: { readonly weights: Weights; readonly choosing: Weights } | undefined;

/** The weights that the product ships (weights.json), read once. */
export function getShippedWeights(): { readonly weights: Weights; readonly choosing: Weights } {
  return (read ??= readWeights(table as WeightTable));
}
