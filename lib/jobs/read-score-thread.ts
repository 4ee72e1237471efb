import { parentPort, workerData } from 'node:worker_threads';
import { readScore } from '@/lib/score/read-score';

/** Runs in a thread of its own that read-score-worker.ts starts, and may be killed at any moment. */
parentPort?.postMessage('started');
parentPort?.postMessage(readScore(workerData as Uint8Array));
