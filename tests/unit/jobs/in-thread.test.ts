import { describe, expect, it } from 'vitest';
import { readInThread } from '@/lib/jobs/in-thread';

const text = (xml: string) => new TextEncoder().encode(xml);

describe('readInThread', () => {
  it('gives the facts of the score that the thread read', async () => {
    const xml = '<score-partwise><part-list/><part id="P1"><measure number="1"><note><pitch><step>C</step><octave>4</octave></pitch><duration>4</duration></note></measure></part></score-partwise>';
    const result = await readInThread(text(xml));
    expect(result.ok && result.value.noteCount).toBe(1);
  });

  it('gives the reader’s refusal as it is', async () => {
    const result = await readInThread(text('<opus/>'));
    expect(result).toMatchObject({ ok: false, error: { code: 'not_musicxml', element: 'opus' } });
  });

  it('kills a thread that takes too long, and says so', async () => {
    const notes = '<note><rest/><duration>1</duration></note>'.repeat(150_000);
    const xml = `<score-partwise><part id="P1">${`<measure>${notes.slice(0, 4100)}</measure>`.repeat(1500)}</part></score-partwise>`;
    const result = await readInThread(text(xml), { milliseconds: 1, megabytes: 512 });
    expect(result).toMatchObject({ ok: false, error: { code: 'timed_out' } });
  });
});
