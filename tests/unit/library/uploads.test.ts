import { describe, expect, it } from 'vitest';
import type { FileFacts } from '@/components/library/read-file';
import { type Upload, type UploadEvent, formatPlace, reduceUploads } from '@/components/library/uploads';

const FACTS: FileFacts = { ok: true, title: 'Aubade', composer: 'Verrin', work: '', bars: 8 };

function fileNamed(name: string): File {
  return new File(['x'], name);
}

function after(...events: readonly UploadEvent[]): readonly Upload[] {
  const chosen: UploadEvent = {
    kind: 'chosen',
    files: [
      { id: 1, file: fileNamed('aubade.mxl'), problem: null },
      { id: 2, file: fileNamed('broken.xml'), problem: null },
      { id: 3, file: fileNamed('notes.txt'), problem: 'Not a MusicXML file.' },
    ],
  };
  return [chosen, ...events].reduce<readonly Upload[]>(reduceUploads, []);
}

function stages(uploads: readonly Upload[]): string[] {
  return uploads.map(({ stage }) => stage);
}

describe('reduceUploads', () => {
  it('looks into each file, and refuses at once one that is no score', () => {
    expect(stages(after())).toEqual(['looking', 'looking', 'refused']);
  });

  it('takes title and composer from the file, the title else from its name', () => {
    const [first, second] = after(
      { kind: 'looked', id: 1, facts: FACTS },
      { kind: 'looked', id: 2, facts: { ...FACTS, title: '', composer: '' } },
    );
    expect(first).toMatchObject({ stage: 'asking', title: 'Aubade', composer: 'Verrin' });
    expect(second).toMatchObject({ stage: 'asking', title: 'broken', composer: '' });
  });

  it('keeps a broken file’s message and place, and lets the others go on', () => {
    const uploads = after(
      { kind: 'looked', id: 1, facts: FACTS },
      { kind: 'looked', id: 2, facts: { ok: false, message: 'It breaks off.', line: 214, element: 'backup' } },
      { kind: 'submitted' },
    );
    expect(stages(uploads)).toEqual(['queued', 'refused', 'refused']);
    expect(uploads[1]).toMatchObject({ problem: 'It breaks off.', place: 'line 214, element <backup>' });
  });

  it('can send a file again after the connection was lost, with what was typed', () => {
    const lost = after(
      { kind: 'looked', id: 1, facts: FACTS },
      { kind: 'typed', id: 1, words: { title: 'My aubade' } },
      { kind: 'submitted' },
      { kind: 'begun', id: 1 },
      { kind: 'progressed', id: 1, sent: 1 },
      { kind: 'answered', id: 1, answer: { outcome: 'failed', problem: 'The connection was lost.' } },
    );
    expect(lost[0]).toMatchObject({ stage: 'failed', problem: 'The connection was lost.' });
    expect(reduceUploads(lost, { kind: 'retried', id: 1 })[0]).toMatchObject({ stage: 'queued', title: 'My aubade', problem: null, sent: 0 });
  });

  it('follows a stored file until the server has read or refused it', () => {
    const stored = after({ kind: 'looked', id: 1, facts: FACTS }, { kind: 'answered', id: 1, answer: { outcome: 'stored', scoreId: 's', title: 'Aubade' } });
    expect(stored[0]).toMatchObject({ stage: 'waiting', scoreId: 's' });
    const read = { kind: 'read', scoreId: 's', title: 'Aubade in B', place: null } as const;
    expect(reduceUploads(stored, { ...read, problem: null })[0]).toMatchObject({ stage: 'ready', title: 'Aubade in B' });
    expect(reduceUploads(stored, { ...read, problem: 'No notes.' })[0]).toMatchObject({ stage: 'refused', problem: 'No notes.' });
  });

  it('says of a file that is there already which score it is', () => {
    const [first] = after({ kind: 'answered', id: 1, answer: { outcome: 'existing', scoreId: 's', title: 'Old' } });
    expect(first).toMatchObject({ stage: 'existing', scoreId: 's', problem: expect.stringContaining('“Old”') });
  });

  it('takes a file off the list', () => {
    expect(after({ kind: 'removed', id: 2 }).map(({ id }) => id)).toEqual([1, 3]);
  });
});

describe('formatPlace', () => {
  it('names line and element, whichever there are', () => {
    expect(formatPlace(3, 'note')).toBe('line 3, element <note>');
    expect(formatPlace(null, 'note')).toBe('element <note>');
    expect(formatPlace(undefined, undefined)).toBeNull();
  });
});
