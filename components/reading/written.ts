import { type EditResult, setNumeral } from '@/lib/harmony/edit';
import { changeKeyFrom } from '@/lib/harmony/edit-keys';
import type { Label, Reading } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import { readRepeatedFigures } from '@/lib/marking/repeated-figures';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { type Key, equalKeys, parseKey } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { composed } from './commands';

/**
 * What is written at a label: a numeral, perhaps with the key it is read in before a colon (`d: iv6`, `Bb: V7`), or a key
 * alone. Empty is a blank.
 */
export interface Written {
  /** Null: the label's key stays. */
  readonly key: Key | null;
  /** Null: no numeral is written. */
  readonly numeral: Numeral | null;
}

export interface WrittenError {
  /** 0-based, where reading stopped. */
  readonly offset: number;
  readonly message: string;
}

const KEY_PART = /^\s*([A-Ga-g](?:#|b|♯|♭)*(?:\s+(?:major|minor))?)\s*:/u;

/** `previous` is the numeral before the label: figures alone repeat it. */
export function parseWritten(text: string, key: Key, sheet: ConventionSheet, previous: Numeral | null = null): Result<Written, WrittenError> {
  const part = KEY_PART.exec(text);
  const newKey = part ? parseKey(part[1] as string) : null;
  if (newKey && !newKey.ok) return err(newKey.error);
  const rest = text.slice(part?.[0].length ?? 0);
  const offset = text.length - rest.length + (rest.length - rest.trimStart().length);
  if (rest.trim() === '') return ok({ key: newKey?.value ?? null, numeral: null });
  const repeated = newKey ? null : readRepeatedFigures(rest.trim(), previous, key.mode);
  if (repeated) return ok({ key: null, numeral: repeated });
  const numeral = parseNumeral(rest.trim(), (newKey?.value ?? key).mode, sheet);
  if (!numeral.ok) return err({ offset: offset + numeral.error.offset, message: numeral.error.message });
  return ok({ key: newKey?.value ?? null, numeral: numeral.value });
}

/** The numeral of the label before, when it is in the same key. */
export function findNumeralBefore(reading: Reading, label: Label): Numeral | null {
  const before = reading.labels.find((other) => other.end === label.start);
  return before && equalKeys(before.key, label.key) ? before.numeral : null;
}

/** Makes it so: the key from the label on, then its numeral. A key alone leaves the numeral to sound as it did. */
export function writeAt(reading: Reading, label: Label, { key, numeral }: Written): EditResult {
  if (!key || equalKeys(key, label.key)) return setNumeral(reading, label.id, numeral);
  const framed = changeKeyFrom(reading, label.start, key, 'sound');
  if (!framed.ok || !numeral) return framed;
  return composed(reading, setNumeral(framed.value.reading, label.id, numeral), framed);
}
