/** Where things lie. DATA_DIR moves everything a run keeps; each run needs a folder of its own. */
import path from 'node:path';

export const ROOT = path.dirname(import.meta.dirname);
export const DATA_DIR = path.resolve(ROOT, process.env.DATA_DIR || '.data');
export const NEXT = path.join(ROOT, 'node_modules/next/dist/bin/next');
/** Node arguments that let it run our TypeScript. */
export const TYPESCRIPT = ['--import', 'tsx'];
