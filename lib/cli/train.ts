import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { smoothCounts } from '../harmony/frequencies';
import { countCorpus } from '../harmony/train/count';
import { LEARNING, type LearningOptions, learn } from '../harmony/train/learn';
import { trainingItem } from '../harmony/train/training-item';
import { type WeightTable, formatWeights } from '../harmony/weight-table';
import { handWeights } from '../harmony/weights';
import { type DevItem, CORPUS, hasCorpus, loadCorpus } from './dev-corpus';

const USAGE = `usage: npm run train [-- --epochs N]
Learns the engine's weights from the development corpus beside the repository and writes lib/harmony/weights.json.
Seeded: the same corpus gives the same file. --epochs 0 keeps the weights set by hand and only counts frequencies.`;

const TARGET = path.join(import.meta.dirname, '../harmony/weights.json');

export function trainOn(items: readonly DevItem[], options: LearningOptions, say: (text: string) => void) {
  const counts = countCorpus(items);
  const hand = handWeights(smoothCounts(counts));
  const weights = options.epochs > 0 ? learn(items.map((item) => trainingItem(item, hand)), hand, options, say) : hand;
  return { weights, choosing: hand, counts };
}

/** One line per term, not per number: a table that people can read and that shows what changed. */
export function writeTable(table: WeightTable): string {
  return JSON.stringify(table, null, 1).replace(/\[\s+([^\]]*?)\s+\]/g, (_, inner: string) => `[${inner.replace(/\s+/g, ' ')}]`) + '\n';
}

function main(args: readonly string[]): number {
  const epochs = args[0] === '--epochs' ? Number(args[1]) : args.length === 0 ? LEARNING.epochs : NaN;
  if (!Number.isInteger(epochs) || epochs < 0) {
    console.error(USAGE);
    return 2;
  }
  if (!hasCorpus()) {
    console.error(`The development corpus is not there: ${path.relative(process.cwd(), CORPUS)}`);
    return 1;
  }
  const items = loadCorpus();
  const { weights, counts } = trainOn(items, { ...LEARNING, epochs }, (text) => console.error(text));
  const provenance = {
    'made by': 'npm run train',
    corpus: `${items.length} analysed scores of the development corpus (When in Rome, CC BY-SA 4.0; see its LICENSE.md)`,
    method: epochs > 0 ? 'conditional likelihood with a margin, AdaGrad from the weights set by hand, averaged' : 'set by hand',
    epochs,
    seed: LEARNING.seed,
  };
  writeFileSync(TARGET, writeTable(formatWeights(weights, counts, provenance)));
  return 0;
}

// Of a bundle that holds this file, too, only the one named after it is this command.
if (path.basename(process.argv[1] ?? '').startsWith('train.')) process.exitCode = main(process.argv.slice(2));
