import { ok } from '../result';
import { CADENTIAL_FORMS, type ConventionSheet, DEFAULT_CONVENTIONS } from './conventions';
import type { Mode } from './key';
import type { Numeral, Target } from './numeral';
import type { Frame, Read } from './numeral-frame';
import { STOPPED } from './numeral-messages';
import { readNamedHead } from './numeral-names';
import { readRomanHead, readTarget } from './numeral-roman';
import { type ScannedNumeral, scanNumeral, stopAt } from './numeral-scan';

export type { NumeralError } from './numeral-scan';

/**
 * Reads a typed numeral in a key of this mode, as the sheet spells labels. Every printed form is read under every sheet
 * (`V7/V` and `V7 of V`, `6/5` and `65`, `N6` and `♭II6`); the sheet decides only what could mean two things:
 * V64 or I64 for the cadential six-four, capitals, accidentals, an unmarked vii7. The error carries the 0-based offset
 * where reading stopped and a sentence that says why.
 */
export function parseNumeral(text: string, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): Read<Numeral> {
  const scanned = scanNumeral(text);
  if (!scanned.ok) return scanned;
  const { head } = scanned.value;
  const applied = readTargets(scanned.value, { text, mode, sheet });
  if (!applied.ok) return applied;
  const frame: Frame = { text, mode: applied.value[0]?.mode ?? mode, sheet };
  const numeral = head.form === 'roman' ? readRomanHead(head, frame) : readNamedHead(head, frame);
  if (!numeral.ok) return numeral;
  const [target] = scanned.value.targets;
  if (numeral.value.special === 'pedal-tone' && target) return stopAt(text, target.at, STOPPED.pedalTarget);
  const { degree, quality, inversion, special, added } = numeral.value;
  // Always the same order of fields, so that equal numerals have equal JSON.
  return ok({ degree, quality, inversion, applied: applied.value, special, added });
}

/** Targets are understood from the last one back: each is a degree of the key of the one after it. */
function readTargets({ targets }: ScannedNumeral, frame: Frame): Read<Target[]> {
  const chain: Target[] = [];
  let mode = frame.mode;
  for (const head of targets.toReversed()) {
    const target = readTarget(head, { ...frame, mode });
    if (!target.ok) return target;
    chain.unshift(target.value);
    mode = target.value.mode;
  }
  return ok(chain);
}

/**
 * Every numeral that a text may mean across the conventions of the cadential six-four, the sheet's own meaning first:
 * V64 is the cadential six-four in one book and the dominant's second inversion in another. Who knows the bass note
 * can choose; one numeral alone for every text that is not ambiguous.
 */
export function parseNumeralReadings(text: string, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): Read<readonly Numeral[]> {
  const first = parseNumeral(text, mode, sheet);
  if (!first.ok) return first;
  const others = CADENTIAL_FORMS.map((cadential) => parseNumeral(text, mode, { ...sheet, cadential }));
  const numerals = [first, ...others].flatMap((read) => (read.ok ? [read.value] : []));
  const texts = numerals.map((numeral) => JSON.stringify(numeral));
  return ok(numerals.filter((_, i) => texts.indexOf(texts[i] as string) === i));
}
