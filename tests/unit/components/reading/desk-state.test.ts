import { describe, expect, it } from 'vitest';
import { type DeskState, type Revision, findSelection, getSelected, openDesk, reduceDesk } from '@/components/reading/desk-state';
import { acceptLabels, setNumeral } from '@/lib/harmony/edit';
import { layOver } from '@/lib/harmony/edit-merge';
import { mergeWithNext } from '@/lib/harmony/edit-spans';
import { unwrap } from '@/lib/result';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { numeralsOf, suggestedFrom } from '../../../support/reading-edits';

const START = suggestedFrom('C: I V IV I');
const desk = () => openDesk(START, 3);

let edits = 0;
function write(state: DeskState, labelId: string, text: string): DeskState {
  const result = setNumeral(state.reading, labelId, unwrap(parseNumeral(text, 'major')));
  return reduceDesk(state, { kind: 'edit', editId: `edit-${(edits += 1)}`, result, words: `Wrote ${text}.` });
}

/** The server's answer to the first pending edit. */
function confirm(state: DeskState): DeskState {
  const edit = state.pending[0]!;
  const revision: Revision = { version: state.version + 1, editId: edit.editId, change: edit.change, by: 'Me' };
  return reduceDesk(state, { kind: 'received', version: revision.version, revisions: [revision], confirmed: edit.editId });
}

describe('an edit', () => {
  it('is seen at once and waits to be saved', () => {
    const state = write(desk(), 'label-1', 'V7');
    expect(numeralsOf(state.reading)).toBe('C: I V7 IV I');
    expect(numeralsOf(state.server)).toBe('C: I V IV I');
    expect(state.pending).toHaveLength(1);
  });

  it('is the server’s once confirmed', () => {
    const state = confirm(write(desk(), 'label-1', 'V7'));
    expect(state).toMatchObject({ version: 4, pending: [] });
    expect(numeralsOf(state.server)).toBe('C: I V7 IV I');
  });

  it('that is refused says why and changes nothing', () => {
    const state = reduceDesk(desk(), { kind: 'edit', editId: 'x', result: mergeWithNext(START, 'label-3'), words: '' });
    expect(state.pending).toHaveLength(0);
    expect(state.said.text).toContain('no label after');
  });
});

describe('undo and redo', () => {
  it('go over the whole session and are edits themselves', () => {
    let state = write(confirm(write(desk(), 'label-1', 'V7')), 'label-2', 'ii6');
    state = reduceDesk(state, { kind: 'undo', editId: 'u1' });
    state = reduceDesk(state, { kind: 'undo', editId: 'u2' });
    expect(numeralsOf(state.reading)).toBe('C: I V IV I');
    expect(state.reading).toEqual(START);
    state = reduceDesk(state, { kind: 'redo', editId: 'r1' });
    expect(numeralsOf(state.reading)).toBe('C: I V7 IV I');
    expect(state.pending.map((p) => p.editId).slice(-3)).toEqual(['u1', 'u2', 'r1']);
  });

  it('bring back a label that was joined away, and select it', () => {
    let state = reduceDesk(desk(), { kind: 'select', labelId: 'label-1' });
    state = reduceDesk(state, { kind: 'edit', editId: 'j', result: mergeWithNext(state.reading, 'label-1'), words: 'Joined.' });
    expect(state.reading.labels).toHaveLength(3);
    state = reduceDesk(state, { kind: 'undo', editId: 'u' });
    expect(state.reading).toEqual(START);
    expect(getSelected(state).id).toBe('label-1');
  });

  it('leave alone what someone else changed since', () => {
    const mine = confirm(write(desk(), 'label-1', 'V7'));
    const theirs = unwrap(setNumeral(mine.server, 'label-1', unwrap(parseNumeral('viio6', 'major'))));
    const received = reduceDesk(mine, { kind: 'received', version: 5, revisions: [{ version: 5, editId: 'their', change: theirs.change, by: 'Ilse' }] });
    expect(received.said.text).toBe('Ilse changed a label.');
    const undone = reduceDesk(received, { kind: 'undo', editId: 'u' });
    expect(numeralsOf(undone.reading)).toBe(numeralsOf(theirs.reading));
    expect(undone.pending).toHaveLength(0);
  });

  it('a new edit ends what could be done again', () => {
    let state = reduceDesk(write(desk(), 'label-1', 'V7'), { kind: 'undo', editId: 'u' });
    state = write(state, 'label-0', 'I6');
    expect(state.redo).toHaveLength(0);
  });
});

describe('what others save', () => {
  it('goes together with edits of other labels still under way', () => {
    const mine = write(desk(), 'label-1', 'V7');
    const theirs = unwrap(acceptLabels(START, ['label-3']));
    const state = reduceDesk(mine, { kind: 'received', version: 4, revisions: [{ version: 4, editId: 'their', change: theirs.change, by: 'Ilse' }] });
    expect(numeralsOf(state.reading)).toBe('C: I V7 IV I');
    expect(state.reading.labels[3]!.state).toBe('accepted');
    expect(state.pending).toHaveLength(1);
  });

  it('is taken in once, however often it is told', () => {
    const theirs = unwrap(setNumeral(START, 'label-3', null));
    const news = { kind: 'received', version: 4, revisions: [{ version: 4, editId: 'their', change: theirs.change, by: 'Ilse' }] } as const;
    const once = reduceDesk(desk(), news);
    expect(reduceDesk(once, news).server).toEqual(once.server);
  });
});

describe('two versions of one label', () => {
  const theirs = unwrap(setNumeral(START, 'label-1', unwrap(parseNumeral('viio6', 'major')))).reading;
  const overtaken = () => {
    const mine = write(write(desk(), 'label-1', 'V7'), 'label-2', 'ii6');
    return reduceDesk(mine, { kind: 'conflicted', conflict: { edit: mine.pending[0]!, version: 4, theirs } });
  };

  it('waits when the choice is put off, with both versions kept', () => {
    const before = overtaken();
    const off = reduceDesk(before, { kind: 'put-off' });
    expect(off.conflict).toMatchObject({ putOff: true, theirs });
    expect(off.pending).toEqual(before.pending);
    expect(reduceDesk(off, { kind: 'choose-now' }).conflict).toMatchObject({ putOff: false });
  });

  it('keeps theirs when taken, and every other edit of mine', () => {
    const state = reduceDesk(overtaken(), { kind: 'take-theirs' });
    expect(numeralsOf(state.reading)).toBe('C: I viio6 ii6 I');
    expect(state).toMatchObject({ version: 4, conflict: null });
    expect(state.pending).toHaveLength(1);
  });

  it('puts mine over theirs as a new edit, before the others', () => {
    const state = overtaken();
    const change = layOver(theirs, state.conflict!.edit.change, () => 'rest');
    const put = reduceDesk(state, { kind: 'put-mine', editId: 'again', change });
    expect(numeralsOf(put.reading)).toBe('C: I V7 ii6 I');
    expect(put.pending.map((p) => p.editId)[0]).toBe('again');
  });
});

describe('selection', () => {
  it('extends from where it was and shrinks back', () => {
    let state = reduceDesk(desk(), { kind: 'select', labelId: 'label-1' });
    state = reduceDesk(state, { kind: 'select', labelId: 'label-3', extend: true });
    expect(findSelection(state).map((l) => l.id)).toEqual(['label-1', 'label-2', 'label-3']);
    state = reduceDesk(state, { kind: 'select', labelId: 'label-0', extend: true });
    expect(findSelection(state).map((l) => l.id)).toEqual(['label-0', 'label-1']);
  });
});
