import { type Key, equalKeys } from '../theory/key';
import type { Numeral } from '../theory/numeral';
import { spellNumeral } from '../theory/spell';
import { type Change, type EditResult, applyChange, changeBetween, equalNumerals, findKeyAt } from './edit';
import { layOver } from './edit-merge';
import { err, ok } from '../result';
import type { Label, Reading } from './reading';

/**
 * How two labels over the same music differ, from the ear to the pen: another root, another kind of chord on it, another
 * bass; the same chord in another frame (tonicised against modulated, or simply in another key); the same notes under
 * another name; the same two chords changing at another moment; one of them a blank.
 */
export const DIFFERENCE_KINDS = ['root', 'quality', 'inversion', 'frame', 'name', 'boundary', 'blank'] as const;
export type DifferenceKind = (typeof DIFFERENCE_KINDS)[number];

/** A stretch of time over which one label of each reading stands and they differ. */
export interface Difference {
  readonly start: number;
  readonly end: number;
  readonly mine: Label;
  readonly theirs: Label;
  /** At least one. */
  readonly kinds: readonly DifferenceKind[];
}

/** Where two readings of one excerpt differ, in order of time. Both must tile the same span. */
export function compareReadings(mine: Reading, theirs: Reading): Difference[] {
  const pieces = overlaps(mine, theirs);
  return pieces.flatMap((piece, i): Difference[] => {
    const kinds = kindsOf(piece);
    if (kinds.length === 0) return splits(piece, pieces[i - 1]) ? [{ ...piece, kinds: ['boundary'] }] : [];
    return [{ ...piece, kinds: isShift(piece, mine, theirs) ? ['boundary'] : kinds }];
  });
}

type Piece = Omit<Difference, 'kinds'>;

function overlaps(mine: Reading, theirs: Reading): Piece[] {
  return mine.labels.flatMap((m) =>
    theirs.labels
      .filter((t) => t.start < m.end && t.end > m.start)
      .map((t) => ({ start: Math.max(m.start, t.start), end: Math.min(m.end, t.end), mine: m, theirs: t })),
  );
}

function kindsOf({ mine, theirs }: Piece): DifferenceKind[] {
  if (!mine.numeral || !theirs.numeral) return mine.numeral === theirs.numeral ? [] : ['blank'];
  return compareChords(mine.key, mine.numeral, theirs.key, theirs.numeral);
}

/** The kinds in which two chords differ; none when they are the same in the same key. */
export function compareChords(keyA: Key, a: Numeral, keyB: Key, b: Numeral): DifferenceKind[] {
  const [one, other] = [spellNumeral(keyA, a), spellNumeral(keyB, b)];
  const sixFour = a.special === 'cadential-six-four' || b.special === 'cadential-six-four';
  const sameNotes = soundOf(one) === soundOf(other);
  if (one.root !== other.root && !(sixFour && sameNotes)) return ['root'];
  const kinds: DifferenceKind[] = [];
  if (!sameNotes && tonesOf(one) !== tonesOf(other)) kinds.push('quality');
  if (one.bass !== other.bass) kinds.push('inversion');
  if (!equalKeys(keyA, keyB) || targetsOf(a) !== targetsOf(b)) kinds.push('frame');
  return kinds.length > 0 || equalNumerals(a, b) ? kinds : ['name'];
}

type Spelled = ReturnType<typeof spellNumeral>;

function tonesOf({ tones }: Spelled): string {
  return tones.map((tone) => tone.fifths).sort((a, b) => a - b).join(' ');
}

function soundOf(chord: Spelled): string {
  return `${chord.bass}: ${tonesOf(chord)}`;
}

function targetsOf({ applied }: Numeral): string {
  return applied.map(({ degree, mode }) => `${degree.step} ${degree.alter} ${mode}`).join('/');
}

function equalLabelled(a: Label | undefined, b: Label | undefined): boolean {
  if (!a || !b) return false;
  return equalKeys(a.key, b.key) && equalNumerals(a.numeral, b.numeral);
}

/** Both readings have both chords one after the other, and change at different moments. */
function isShift({ mine: m, theirs: t }: Piece, mine: Reading, theirs: Reading): boolean {
  const [mBefore, mAfter] = neighbours(mine, m);
  const [tBefore, tAfter] = neighbours(theirs, t);
  const theyChangeEarlier = equalLabelled(m, tBefore) && equalLabelled(t, mAfter);
  const theyChangeLater = equalLabelled(m, tAfter) && equalLabelled(t, mBefore);
  return theyChangeEarlier || theyChangeLater;
}

function neighbours({ labels }: Reading, label: Label): [Label | undefined, Label | undefined] {
  const at = labels.findIndex((l) => l.id === label.id);
  return [labels[at - 1], labels[at + 1]];
}

/** One reading writes the chord anew where the other lets it go on. */
function splits(piece: Piece, before: Piece | undefined): boolean {
  if (!before || before.end !== piece.start) return false;
  const mineGoesOn = before.mine.id === piece.mine.id;
  const theirsGoesOn = before.theirs.id === piece.theirs.id;
  return mineGoesOn !== theirsGoesOn && kindsOf(before).length === 0;
}

/**
 * Writes the other reading's label, with its span and its key, over one's own; what stood only partly there is cut. The
 * label keeps the id of the one of mine it covers most, so that remarks stay with it. `newId` names cut-off rests.
 */
export function takeOver(mine: Reading, { theirs }: Pick<Difference, 'theirs'>, newId: () => string): EditResult {
  const { start, end, key } = theirs;
  const covered = mine.labels.filter((l) => l.start < end && l.end > start);
  const shared = (l: Label) => Math.min(l.end, end) - Math.max(l.start, start);
  const id = covered.reduce<Label | null>((best, l) => (!best || shared(l) > shared(best) ? l : best), null)?.id ?? newId();
  const laid: Label = { ...theirs, id, state: 'changed', certainty: null };
  const isKeyed = covered.every((l) => equalKeys(findKeyAt(mine, Math.max(l.start, start)) ?? l.key, key));
  const wanted: Change = { labels: { before: [], after: [laid] }, regions: { before: [], after: isKeyed ? [] : [{ start, end, key }] } };
  const change = layOver(mine, wanted, newId);
  const applied = applyChange(mine, change);
  if (!applied.ok) return applied;
  const settled = changeBetween(mine, applied.value);
  if (settled.labels.after.length + settled.regions.after.length === 0) return err({ kind: 'nothing_changes', message: 'Nothing differs here any more.' });
  return ok({ reading: applied.value, change: settled });
}
