import type { Dispatch } from 'react';
import { findBar } from '@/components/score/beats';
import { isSettled } from '@/components/score/label-look';
import { type EditResult, acceptLabels, changeBetween, findSuggestions, setNumeral } from '@/lib/harmony/edit';
import { changeKey, exchangeFrame, togglePivot } from '@/lib/harmony/edit-keys';
import { type LabelPattern, layPattern, takePattern } from '@/lib/harmony/edit-pattern';
import { mergeWithNext, moveBoundary, splitLabel } from '@/lib/harmony/edit-spans';
import type { Label, OtherReading } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import { equalKeys } from '@/lib/theory/key';
import { type DeskAction, type DeskState, findSelection, getSelected } from './desk-state';
import type { Powers } from './desk-types';
import type { Beside } from './use-beside';
import type { Played } from './use-sound';

/** What a command works on. `ui` opens what the desk shows beside the score. */
export interface DeskContext {
  readonly state: DeskState;
  readonly dispatch: Dispatch<DeskAction>;
  readonly score: Score;
  /** Moments at which labels can begin, sorted. */
  readonly onsets: readonly number[];
  readonly powers: Powers;
  canWrite(label: Label): boolean;
  /** The label nearest in the system above (−1) or below (1); null at the edge. */
  neighbourSystem(labelId: string, step: -1 | 1): string | null;
  readonly ui: DeskUi;
  /** The reading beside this one, when there is one. */
  readonly beside: Beside | null;
}

export interface DeskUi {
  write(text: string | null): void;
  chooseKey(): void;
  split(): void;
  remark(): void;
  help(): void;
  zoom(step: -1 | 1): void;
  nextTab(): void;
  toggleArrows(): void;
  /** Opens the choice of a certainty from which on all is accepted. */
  acceptFrom(): void;
  /** Puts the keyboard on the notes left over, in the margin. */
  nameTones(): void;
  readonly pattern: LabelPattern | null;
  keepPattern(pattern: LabelPattern): void;
  play(what: Played): void;
  /** Whether something sounds; `stop` ends it. */
  readonly playing: boolean;
  stop(): void;
}

type Need = 'write' | 'spans' | 'keys' | 'proposals' | 'beside';

export const COMMAND_GROUPS = ['Going about', 'Labels', 'Spans', 'Keys', 'Side by side', 'Sound', 'The desk'] as const;

export interface Command {
  readonly id: string;
  /** As on the help sheet and on buttons. */
  readonly words: string;
  readonly keys: readonly string[];
  readonly group: (typeof COMMAND_GROUPS)[number];
  readonly needs?: Need;
  run(context: DeskContext): void;
}

function edit(context: DeskContext, result: EditResult, words: string, selectId?: string): void {
  context.dispatch({ kind: 'edit', editId: crypto.randomUUID(), result, words, ...(selectId ? { selectId } : {}) });
}

function select(context: DeskContext, labelId: string | undefined | null, extend = false): void {
  if (labelId) context.dispatch({ kind: 'select', labelId, extend });
}

function step(context: DeskContext, by: number, extend = false): void {
  const { labels } = context.state.reading;
  const at = labels.findIndex((l) => l.id === context.state.selectedId);
  select(context, labels[Math.max(0, Math.min(labels.length - 1, at + by))]?.id, extend);
}

/** The first label of the bar before or after the one the selected label begins in. */
function stepBar(context: DeskContext, by: -1 | 1): void {
  const { score, state } = context;
  const here = findBar(score, getSelected(state).start)?.index ?? 0;
  const barOf = (label: Label) => findBar(score, label.start)?.index ?? 0;
  const { labels } = state.reading;
  const next = by > 0 ? labels.find((l) => barOf(l) > here) : labels.findLast((l) => barOf(l) < here);
  const first = next && labels.find((l) => barOf(l) === barOf(next));
  select(context, first?.id);
}

/** The next label that nobody has settled, going round once. */
export function findNextOpen(state: DeskState, canWrite: (label: Label) => boolean): Label | null {
  const { labels } = state.reading;
  const at = labels.findIndex((l) => l.id === state.selectedId);
  const round = [...labels.slice(at + 1), ...labels.slice(0, at + 1)];
  return round.find((l) => canWrite(l) && !isSettled(l)) ?? null;
}

function accept(context: DeskContext): void {
  const chosen = findSelection(context.state).filter((l) => l.state === 'suggested' && l.numeral);
  if (chosen.length === 0) return getSelected(context.state).numeral ? step(context, 1) : context.ui.write(null);
  const { labels } = context.state.reading;
  const next = labels[labels.findIndex((l) => l.id === chosen.at(-1)?.id) + 1];
  edit(context, acceptLabels(context.state.reading, chosen.map((l) => l.id)), countWords('Accepted', chosen.length), next?.id);
}

function acceptSpan(context: DeskContext, start: number, end: number, atLeast = 0): void {
  const chosen = findSuggestions(context.state.reading, start, end, atLeast);
  if (chosen.length === 0) return context.dispatch({ kind: 'say', text: 'No suggestion is left there.' });
  edit(context, acceptLabels(context.state.reading, chosen.map((l) => l.id)), countWords('Accepted', chosen.length));
}

function countWords(verb: string, count: number): string {
  return `${verb} ${count === 1 ? 'a label' : `${count} labels`}.`;
}

function acceptBar(context: DeskContext): void {
  const bar = findBar(context.score, getSelected(context.state).start);
  if (bar) acceptSpan(context, bar.start, bar.start + bar.length);
}

/** Accepts every suggestion that the engine holds at least this certain. */
export function acceptCertain(context: DeskContext, atLeast: number): void {
  acceptSpan(context, context.state.reading.start, context.state.reading.end, atLeast);
}

/** Takes one of the engine's other readings; one in another key sets that key for the label. */
export function chooseOther(context: DeskContext, other: OtherReading): void {
  const label = getSelected(context.state);
  const { reading } = context.state;
  if (equalKeys(other.key, label.key)) return edit(context, setNumeral(reading, label.id, other.numeral), 'Took another reading.');
  const framed = changeKey(reading, label.start, label.end, other.key, 'sound');
  if (!framed.ok) return edit(context, framed, '');
  edit(context, composed(reading, setNumeral(framed.value.reading, label.id, other.numeral), framed), 'Took another reading and its key.');
}

/** Two edits as one: the second's reading, the difference from the very first. */
export function composed(from: DeskState['reading'], second: EditResult, first: EditResult): EditResult {
  const last = second.ok ? second : first;
  return last.ok ? { ok: true, value: { reading: last.value.reading, change: changeBetween(from, last.value.reading) } } : last;
}

function moveStart(context: DeskContext, by: -1 | 1): void {
  const label = getSelected(context.state);
  const to = by < 0 ? context.onsets.findLast((t) => t < label.start) : context.onsets.find((t) => t > label.start);
  edit(context, moveBoundary(context.state.reading, label.id, to ?? label.start), by < 0 ? 'Begins earlier.' : 'Begins later.');
}

export function splitAt(context: DeskContext, tick: number): void {
  const label = getSelected(context.state);
  const newId = crypto.randomUUID();
  edit(context, splitLabel(context.state.reading, label.id, tick, newId), 'Split the label.', newId);
}

function copyPattern(context: DeskContext): void {
  const chosen = findSelection(context.state);
  const pattern = takePattern(chosen);
  if (!pattern) return;
  context.ui.keepPattern(pattern);
  context.dispatch({ kind: 'say', text: chosen.length === 1 ? 'Copied a label.' : `Copied ${chosen.length} labels as a pattern.` });
}

function pastePattern(context: DeskContext): void {
  const { pattern } = context.ui;
  if (!pattern) return context.dispatch({ kind: 'say', text: 'Nothing was copied yet: select labels and copy them first.' });
  const at = findSelection(context.state)[0]?.start ?? getSelected(context.state).start;
  edit(context, layPattern(context.state.reading, pattern, at, () => crypto.randomUUID()), 'Laid the copied pattern here.');
}

function blank(context: DeskContext): void {
  const label = getSelected(context.state);
  edit(context, setNumeral(context.state.reading, label.id, null), 'Took the numeral away.');
}

export const COMMANDS: readonly Command[] = [
  { id: 'next', words: 'Next label', keys: ['ArrowRight'], group: 'Going about', run: (c) => step(c, 1) },
  { id: 'previous', words: 'Label before', keys: ['ArrowLeft'], group: 'Going about', run: (c) => step(c, -1) },
  { id: 'next-bar', words: 'Next bar', keys: ['Ctrl+ArrowRight'], group: 'Going about', run: (c) => stepBar(c, 1) },
  { id: 'previous-bar', words: 'Bar before', keys: ['Ctrl+ArrowLeft'], group: 'Going about', run: (c) => stepBar(c, -1) },
  { id: 'down', words: 'System below', keys: ['ArrowDown'], group: 'Going about', run: (c) => select(c, c.neighbourSystem(c.state.selectedId, 1)) },
  { id: 'up', words: 'System above', keys: ['ArrowUp'], group: 'Going about', run: (c) => select(c, c.neighbourSystem(c.state.selectedId, -1)) },
  { id: 'first', words: 'First label', keys: ['Home'], group: 'Going about', run: (c) => select(c, c.state.reading.labels[0]?.id) },
  { id: 'last', words: 'Last label', keys: ['End'], group: 'Going about', run: (c) => select(c, c.state.reading.labels.at(-1)?.id) },
  { id: 'next-open', words: 'Next open label', keys: ['o'], group: 'Going about', needs: 'write', run: (c) => select(c, findNextOpen(c.state, c.canWrite)?.id) },
  { id: 'extend-right', words: 'Select on to the right', keys: ['Shift+ArrowRight'], group: 'Going about', run: (c) => step(c, 1, true) },
  { id: 'extend-left', words: 'Select on to the left', keys: ['Shift+ArrowLeft'], group: 'Going about', run: (c) => step(c, -1, true) },

  { id: 'accept', words: 'Accept, and on to the next', keys: ['Enter'], group: 'Labels', needs: 'write', run: accept },
  { id: 'accept-bar', words: 'Accept the bar', keys: ['Shift+Enter'], group: 'Labels', needs: 'proposals', run: acceptBar },
  { id: 'accept-so-far', words: 'Accept everything up to here', keys: ['Ctrl+Enter'], group: 'Labels', needs: 'proposals', run: (c) => acceptSpan(c, c.state.reading.start, getSelected(c.state).end) },
  { id: 'accept-from', words: 'Accept all from a certainty on', keys: ['z'], group: 'Labels', needs: 'proposals', run: (c) => c.ui.acceptFrom() },
  { id: 'write', words: 'Write the numeral', keys: ['F2'], group: 'Labels', needs: 'write', run: (c) => c.ui.write(null) },
  { id: 'blank', words: 'Take the numeral away', keys: ['Delete', 'Backspace'], group: 'Labels', needs: 'write', run: blank },

  { id: 'tones', words: 'Name the notes left over', keys: ['T'], group: 'Labels', needs: 'proposals', run: (c) => c.ui.nameTones() },

  { id: 'split', words: 'Split at a note', keys: ['s'], group: 'Spans', needs: 'spans', run: (c) => c.ui.split() },
  { id: 'join', words: 'Join with the next', keys: ['j'], group: 'Spans', needs: 'spans', run: (c) => edit(c, mergeWithNext(c.state.reading, c.state.selectedId), 'Joined two labels.') },
  { id: 'start-earlier', words: 'Begin a note earlier', keys: ['['], group: 'Spans', needs: 'spans', run: (c) => moveStart(c, -1) },
  { id: 'start-later', words: 'Begin a note later', keys: [']'], group: 'Spans', needs: 'spans', run: (c) => moveStart(c, 1) },

  { id: 'copy', words: 'Copy the selected labels', keys: ['Ctrl+C'], group: 'Spans', run: copyPattern },
  { id: 'paste', words: 'Lay the copy here, in this key', keys: ['Ctrl+V'], group: 'Spans', needs: 'spans', run: pastePattern },

  { id: 'key', words: 'Change the key from here', keys: ['k'], group: 'Keys', needs: 'keys', run: (c) => c.ui.chooseKey() },
  { id: 'exchange', words: 'Tonicise or modulate', keys: ['t'], group: 'Keys', needs: 'keys', run: (c) => edit(c, exchangeFrame(c.state.reading, findSelection(c.state)), 'Read in the other frame.') },

  { id: 'pivot', words: 'Pivot: read in the next key too', keys: ['q'], group: 'Keys', needs: 'keys', run: (c) => edit(c, togglePivot(c.state.reading, c.state.selectedId), getSelected(c.state).pivot ? 'No pivot any more.' : 'A pivot, read in both keys.') },

  { id: 'next-difference', words: 'Next difference', keys: ['x'], group: 'Side by side', needs: 'beside', run: (c) => c.beside?.step(1) },
  { id: 'previous-difference', words: 'Difference before', keys: ['X'], group: 'Side by side', needs: 'beside', run: (c) => c.beside?.step(-1) },
  { id: 'take-over', words: 'Take theirs over', keys: ['y'], group: 'Side by side', needs: 'beside', run: (c) => c.beside?.take(c.beside.current) },

  { id: 'play', words: 'Play from here, or stop', keys: ['Space'], group: 'Sound', run: (c) => (c.ui.playing ? c.ui.stop() : c.ui.play('from-here')) },
  { id: 'play-span', words: 'Play the selection', keys: ['Shift+Space'], group: 'Sound', run: (c) => c.ui.play('span') },
  { id: 'play-chord', words: 'Play the label as a chord', keys: ['h'], group: 'Sound', run: (c) => c.ui.play('chord') },
  { id: 'play-reduction', words: 'Play the chords from here', keys: ['H'], group: 'Sound', run: (c) => c.ui.play('reduction') },

  { id: 'undo', words: 'Undo', keys: ['Ctrl+Z'], group: 'The desk', needs: 'write', run: (c) => c.dispatch({ kind: 'undo', editId: crypto.randomUUID() }) },
  { id: 'redo', words: 'Redo', keys: ['Ctrl+Shift+Z', 'Ctrl+Y'], group: 'The desk', needs: 'write', run: (c) => c.dispatch({ kind: 'redo', editId: crypto.randomUUID() }) },
  { id: 'remark', words: 'Write a remark', keys: ['m'], group: 'The desk', run: (c) => c.ui.remark() },
  { id: 'tab', words: 'Next page of the margin', keys: ['w'], group: 'The desk', run: (c) => c.ui.nextTab() },
  { id: 'arrows', words: 'Resolutions on the score', keys: ['r'], group: 'The desk', needs: 'proposals', run: (c) => c.ui.toggleArrows() },
  { id: 'larger', words: 'Larger', keys: ['>'], group: 'The desk', run: (c) => c.ui.zoom(1) },
  { id: 'smaller', words: 'Smaller', keys: ['<'], group: 'The desk', run: (c) => c.ui.zoom(-1) },
  { id: 'help', words: 'All keys', keys: ['?'], group: 'The desk', run: (c) => c.ui.help() },
];

export function getCommand(id: string): Command {
  const found = COMMANDS.find((command) => command.id === id);
  if (!found) throw new Error(`no command ${id}`);
  return found;
}

/** Commands this desk has. `proposals` commands also write. */
export function isOffered(command: Command, powers: Powers): boolean {
  if (!command.needs) return true;
  if (command.needs === 'proposals') return powers.proposals && (powers.write || command.id === 'arrows');
  if (command.id === 'take-over') return powers.beside && powers.spans && powers.keys;
  return powers[command.needs];
}

/** Runs a command where it is offered and the label may be written. */
export function runCommand(context: DeskContext, id: string): void {
  const command = getCommand(id);
  if (!isOffered(command, context.powers)) return;
  const touches = command.needs === 'write' && command.group === 'Labels';
  if (touches && !context.canWrite(getSelected(context.state))) {
    return context.dispatch({ kind: 'say', text: 'This label is given and not to be changed.' });
  }
  command.run(context);
}
