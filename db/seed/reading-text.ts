import type { StoredLabel, StoredReading, StoredRegion } from '@/db/queries/reading-rows';
import type { LabelState } from '@/lib/harmony/reading';
import type { Key } from '@/lib/theory/key';
import { parseKey } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { parseNumeral } from '@/lib/theory/numeral-parse';

export interface ReadingTextOptions {
  readonly ticksPerQuarter: number;
  readonly newId: () => string;
  readonly state: LabelState;
}

/** Parses a reading as db/seed/music/readings.ts writes them. Throws on what it cannot read: the texts are part of the program. */
export function parseReadingText(text: string, options: ReadingTextOptions): StoredReading {
  const labels: StoredLabel[] = [];
  const regions: { start: number; end: number; key: Key }[] = [];
  let at = 0;
  for (const token of text.split(/[\s|]+/)) {
    if (token.endsWith(':')) {
      regions.push({ start: at, end: at, key: keyOf(token.slice(0, -1)) });
      continue;
    }
    const region = regions.at(-1);
    if (!region) throw new Error('a reading begins with its key');
    const [numeral = '', quarters = '1'] = token.split('*');
    const end = at + Number(quarters) * options.ticksPerQuarter;
    labels.push(labelOf(numeral, { start: at, end }, region.key, options));
    region.end = at = end;
  }
  return { start: 0, end: at, labels, regions: regions satisfies StoredRegion[] };
}

function labelOf(text: string, span: { start: number; end: number }, key: Key, options: ReadingTextOptions): StoredLabel {
  return { id: options.newId(), ...span, key, numeral: numeralOf(text, key), state: options.state, certainty: null, others: [] };
}

/** `G` is G major, `g` G minor. */
function keyOf(name: string): Key {
  const isMinor = name.charAt(0) === name.charAt(0).toLowerCase();
  const parsed = parseKey(`${name} ${isMinor ? 'minor' : 'major'}`);
  if (!parsed.ok) throw new Error(`unreadable key "${name}"`);
  return parsed.value;
}

export function numeralOf(text: string, key: Key): Numeral {
  const parsed = parseNumeral(text, key.mode);
  if (!parsed.ok) throw new Error(`unreadable numeral "${text}": ${parsed.error.message}`);
  return parsed.value;
}
