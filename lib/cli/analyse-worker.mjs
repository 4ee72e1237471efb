// A worker of `npm run analyse`: takes jobs, sends outcomes. Plain JavaScript, so that it can load the TypeScript loader first.
import { createRequire } from 'node:module';
import { parentPort } from 'node:worker_threads';
import { register } from 'tsx/cjs/api';

register();
const { analyseFile } = createRequire(import.meta.url)('./analyse-file.ts');

parentPort.on('message', (job) => parentPort.postMessage(analyseFile(job)));
