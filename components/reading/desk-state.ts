import { type Change, type EditResult, applyChange, findLabel, invertChange } from '@/lib/harmony/edit';
import { foldChanges } from '@/lib/harmony/edit-merge';
import type { Label, Reading } from '@/lib/harmony/reading';

/**
 * What the desk knows. `server` is the reading at `version`; `pending` are edits made here that the server has not
 * confirmed, in order; `reading` is always `server` with `pending` laid on it: what is seen.
 */
export interface DeskState {
  readonly version: number;
  readonly server: Reading;
  readonly pending: readonly PendingEdit[];
  readonly reading: Reading;
  readonly undo: readonly Step[];
  readonly redo: readonly Step[];
  readonly selectedId: string;
  /** Other end of a selection over several labels; null for one label. */
  readonly anchorId: string | null;
  readonly conflict: Conflict | null;
  /** What was last done or could not be done, for people; `count` tells two alike apart. */
  readonly said: { readonly text: string; readonly count: number };
}

/** `editId` is made once and sent with every retry: the server does each edit exactly once. */
export interface PendingEdit {
  readonly editId: string;
  readonly change: Change;
  readonly words: string;
}

interface Step {
  readonly change: Change;
  readonly words: string;
  readonly selectedId: string;
}

/** An edit of ours that another one overtook: the server's reading does not hold the labels it set out from. */
export interface Conflict {
  readonly edit: PendingEdit;
  readonly version: number;
  readonly theirs: Reading;
  /** The choice was put off: nothing is sent until it is made. */
  readonly putOff: boolean;
}

/** A saved edit as the server tells it. */
export interface Revision {
  readonly version: number;
  readonly editId: string;
  readonly change: Change;
  /** Whose edit it was, by name; null for the engine. */
  readonly by: string | null;
}

export type DeskAction =
  | { readonly kind: 'edit'; readonly editId: string; readonly result: EditResult; readonly words: string; readonly selectId?: string }
  | { readonly kind: 'undo' | 'redo'; readonly editId: string }
  | { readonly kind: 'select'; readonly labelId: string; readonly extend?: boolean }
  | { readonly kind: 'adopt'; readonly edits: readonly PendingEdit[] }
  | { readonly kind: 'received'; readonly version: number; readonly revisions: readonly Revision[]; readonly confirmed?: string }
  | { readonly kind: 'conflicted'; readonly conflict: Omit<Conflict, 'putOff'> }
  | { readonly kind: 'put-off' | 'choose-now' }
  | { readonly kind: 'take-theirs' }
  | { readonly kind: 'put-mine'; readonly editId: string; readonly change: Change }
  | { readonly kind: 'say'; readonly text: string };

export function openDesk(reading: Reading, version: number): DeskState {
  return {
    version,
    server: reading,
    pending: [],
    reading,
    undo: [],
    redo: [],
    selectedId: reading.labels[0]?.id ?? '',
    anchorId: null,
    conflict: null,
    said: { text: '', count: 0 },
  };
}

export function reduceDesk(state: DeskState, action: DeskAction): DeskState {
  switch (action.kind) {
    case 'edit':
      return makeEdit(state, action);
    case 'undo':
      return stepBack(state, action.editId, 'undo');
    case 'redo':
      return stepBack(state, action.editId, 'redo');
    case 'select':
      return select(state, action.labelId, action.extend ?? false);
    case 'adopt':
      return show({ ...state, pending: [...action.edits, ...state.pending] });
    case 'received':
      return receive(state, action);
    case 'conflicted':
      return { ...state, conflict: { ...action.conflict, putOff: false } };
    case 'put-off':
      return say(putOff(state, true), 'Both versions are kept. Nothing is sent until you have chosen one.');
    case 'choose-now':
      return putOff(state, false);
    case 'take-theirs':
      return say(settle(state, []), 'Theirs stands.');
    case 'put-mine':
      return say(settle(state, replacement(state, action)), 'Yours stands.');
    case 'say':
      return say(state, action.text);
  }
}

export function getSelected(state: DeskState): Label {
  return findLabel(state.reading, state.selectedId) ?? (state.reading.labels[0] as Label);
}

/** The labels of the selection, in order. */
export function findSelection(state: DeskState): readonly Label[] {
  const at = state.reading.labels.findIndex((l) => l.id === state.selectedId);
  const other = state.reading.labels.findIndex((l) => l.id === state.anchorId);
  if (other === -1) return state.reading.labels.slice(at, at + 1);
  return state.reading.labels.slice(Math.min(at, other), Math.max(at, other) + 1);
}

function say(state: DeskState, text: string): DeskState {
  return { ...state, said: { text, count: state.said.count + 1 } };
}

/** Lays what is pending on what the server knows, and keeps the selection where it was in time. */
function show(state: DeskState): DeskState {
  const reading = foldChanges(state.server, state.pending.map((p) => p.change));
  return keepSelection({ ...state, reading }, state.reading);
}

function keepSelection(state: DeskState, before: Reading): DeskState {
  const { labels } = state.reading;
  const anchorId = labels.some((l) => l.id === state.anchorId) ? state.anchorId : null;
  if (labels.some((l) => l.id === state.selectedId)) return { ...state, anchorId };
  const was = findLabel(before, state.selectedId)?.start ?? 0;
  const nearest = labels.findLast((l) => l.start <= was) ?? labels[0];
  return { ...state, anchorId: null, selectedId: nearest?.id ?? '' };
}

function makeEdit(state: DeskState, action: Extract<DeskAction, { kind: 'edit' }>): DeskState {
  if (!action.result.ok) return say(state, action.result.error.message);
  const { change } = action.result.value;
  const step: Step = { change, words: action.words, selectedId: state.selectedId };
  const made = addEdit(state, { editId: action.editId, change, words: action.words });
  return say({ ...made, undo: [...state.undo, step], redo: [], ...selecting(action.selectId) }, action.words);
}

function selecting(labelId: string | undefined): Partial<DeskState> {
  return labelId === undefined ? {} : { selectedId: labelId, anchorId: null };
}

function addEdit(state: DeskState, edit: PendingEdit): DeskState {
  return show({ ...state, pending: [...state.pending, edit] });
}

function stepBack(state: DeskState, editId: string, way: 'undo' | 'redo'): DeskState {
  const step = state[way].at(-1);
  if (!step) return say(state, way === 'undo' ? 'Nothing to undo.' : 'Nothing to redo.');
  const change = way === 'undo' ? invertChange(step.change) : step.change;
  const words = `${way === 'undo' ? 'Undone' : 'Done again'}: ${step.words}`;
  const rest = state[way].slice(0, -1);
  if (!applyChange(state.reading, change).ok) {
    return say({ ...state, [way]: rest }, 'That was changed by someone else meanwhile and stays as it is.');
  }
  const made = addEdit(state, { editId, change, words });
  const other = way === 'undo' ? 'redo' : 'undo';
  return say({ ...made, [way]: rest, [other]: [...state[other], step], selectedId: pick(made, step.selectedId), anchorId: null }, words);
}

function pick(state: DeskState, labelId: string): string {
  return findLabel(state.reading, labelId) ? labelId : state.selectedId;
}

function select(state: DeskState, labelId: string, extend: boolean): DeskState {
  if (!findLabel(state.reading, labelId)) return state;
  return { ...state, selectedId: labelId, anchorId: extend ? (state.anchorId ?? state.selectedId) : null };
}

function receive(state: DeskState, action: Extract<DeskAction, { kind: 'received' }>): DeskState {
  const fresh = action.revisions.filter((r) => r.version > state.version);
  const known = new Set([...action.revisions.map((r) => r.editId), ...(action.confirmed ? [action.confirmed] : [])]);
  const others = fresh.filter((r) => !state.pending.some((p) => p.editId === r.editId));
  const received = show({
    ...state,
    version: Math.max(state.version, action.version),
    server: foldChanges(state.server, fresh.map((r) => r.change)),
    pending: state.pending.filter((p) => !known.has(p.editId)),
  });
  return others.length > 0 ? say(received, newsOf(others)) : received;
}

function newsOf(revisions: readonly Revision[]): string {
  const names = [...new Set(revisions.map((r) => r.by ?? 'The engine'))].join(', ');
  return revisions.length === 1 ? `${names} changed a label.` : `${names} made ${revisions.length} changes.`;
}

function putOff(state: DeskState, isPutOff: boolean): DeskState {
  return state.conflict ? { ...state, conflict: { ...state.conflict, putOff: isPutOff } } : state;
}

/** Ends a conflict: the overtaken edit goes, `instead` comes first in the queue. */
function settle(state: DeskState, instead: readonly PendingEdit[]): DeskState {
  if (!state.conflict) return state;
  const { edit, version, theirs } = state.conflict;
  const pending = [...instead, ...state.pending.filter((p) => p.editId !== edit.editId)];
  return show({ ...state, conflict: null, version, server: theirs, pending });
}

function replacement(state: DeskState, action: Extract<DeskAction, { kind: 'put-mine' }>): PendingEdit[] {
  return state.conflict ? [{ ...state.conflict.edit, editId: action.editId, change: action.change }] : [];
}
