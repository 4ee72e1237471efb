import { readFileSync } from 'node:fs';
import { readScoreText } from '@/lib/score/read-score';

/** Loads a text and, in mode `read`, reads it as a score; started with ever smaller heaps to see what that needs. */
const [mode, file = ''] = process.argv.slice(2);
const xml = readFileSync(file, 'utf8');
const result = mode === 'read' ? readScoreText(xml) : null;
if (result && !result.ok) throw new Error(result.error.message);
console.log(xml.length);
