import { describe, expect, it } from 'vitest';
import { performedBars } from '@/lib/score/performed-bars';
import { note, onePart } from '../../support/musicxml';
import { mustRead } from '../../support/score-text';

// Common practice, no source, unless a test says otherwise. Bars are named by their numbers, from 1.

const start = '<barline location="left"><repeat direction="forward"/></barline>';
const end = '<barline location="right"><repeat direction="backward"/></barline>';
const times = (count: number) => `<barline location="right"><repeat direction="backward" times="${count}"/></barline>`;
const opening = (passes: string) => `<barline location="left"><ending number="${passes}" type="start"/></barline>`;
const closing = (passes: string, back = false, type = 'stop') => `<barline location="right"><ending number="${passes}" type="${type}"/>${back ? '<repeat direction="backward"/>' : ''}</barline>`;
const sound = (attributes: string) => `<direction><direction-type><words>x</words></direction-type><sound ${attributes}/></direction>`;
const words = (text: string) => `<direction><direction-type><words>${text}</words></direction-type></direction>`;
const bar = (before = '', after = '') => before + note('C4', { duration: 4 }) + after;

function played(...bars: string[]): string {
  return performedBars(mustRead(onePart(...bars))).map((index) => index + 1).join(' ');
}

describe('performedBars', () => {
  it('is the written order without signs', () => {
    expect(played(bar(), bar(), bar())).toBe('1 2 3');
  });

  it('goes back to the start sign, or to the beginning', () => {
    expect(played(bar(), bar(start, end), bar())).toBe('1 2 2 3');
    expect(played(bar(), bar('', end), bar())).toBe('1 2 1 2 3');
  });

  it('goes back to behind the last repeat where there is no start sign', () => {
    expect(played(bar('', end), bar(), bar('', end), bar())).toBe('1 1 2 3 2 3 4');
  });

  it('plays as often as written', () => {
    expect(played(bar(start, times(4)), bar())).toBe('1 1 1 1 2');
  });

  it('takes endings by their passes', () => {
    expect(played(bar(), bar(opening('1'), closing('1', true)), bar(opening('2'), closing('2')), bar())).toBe('1 2 1 3 4');
    expect(played(bar(), bar(opening('1,2'), closing('1,2', true)), bar(opening('3'), closing('3')))).toBe('1 2 1 2 1 3');
    expect(played(bar(), bar(opening('1'), closing('1', true)), bar(opening('2'), closing('2', true)), bar())).toBe('1 2 1 3 4');
  });

  it('repeats again after a pair of endings', () => {
    expect(played(bar(), bar(opening('1'), closing('1', true)), bar(opening('2'), closing('2')), bar(start), bar('', end))).toBe('1 2 1 3 4 5 4 5');
  });

  it('keeps a repeat that starts in the second ending apart', () => {
    // Source: 45e of the MusicXML test suite (MIT), its second group.
    expect(played(bar(start), bar(opening('1'), closing('1', true)), bar(start + opening('2'), closing('2', false, 'discontinue')), bar('', end), bar())).toBe('1 2 1 3 4 3 4 5');
  });

  it('plays nested repeats from the inside out', () => {
    expect(played(bar(start), bar(start, end), bar('', end))).toBe('1 2 2 3 1 2 2 3');
  });

  it('goes back da capo to the fine, without taking repeats again', () => {
    expect(played(bar('', end), bar('', sound('fine="yes"')), bar('', sound('dacapo="yes"')))).toBe('1 1 2 3 1 2');
    expect(played(bar(), bar('', words('Fine')), bar('', words('D.C. al Fine')))).toBe('1 2 3 1 2');
  });

  it('goes back dal segno and on to the coda', () => {
    const segno = sound('segno="1"');
    expect(played(bar(), bar(segno), bar('', sound('tocoda="1"')), bar('', sound('dalsegno="1"')), bar(sound('coda="1"')))).toBe('1 2 3 4 2 3 5');
  });

  it('plays the last ending after a da capo', () => {
    expect(played(bar(), bar(opening('1'), closing('1', true)), bar(opening('2'), closing('2')), bar('', sound('dacapo="yes"')))).toBe('1 2 1 3 4 1 3 4');
  });

  it('ends even when the signs make no sense', () => {
    expect(played(bar(opening('1')), bar(opening('7'), end), bar('', sound('tocoda="1"')), bar('', sound('dalsegno="1"')))).toMatch(/^1/);
  });
});
