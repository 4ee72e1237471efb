import { spawnSync } from 'node:child_process';
import path from 'node:path';

import { describe, expect, it } from 'vitest';

import { spell } from '@/lib/cli/spell';

function run(...args: string[]): { status: number; out: string[]; complaints: string[] } {
  const out: string[] = [];
  const complaints: string[] = [];
  const status = spell(args, (line) => out.push(line), (line) => complaints.push(line));
  return { status, out, complaints };
}

describe('spell', () => {
  // Source: Open Music Theory v1 (CC BY-SA 4.0), "Applied chords"; Integrated Musicianship: Theory, ch. 14b–c, 18a.
  it('prints a line per numeral: notes from the bass up, root, quality, figures', () => {
    expect(run('Eb', 'major', 'V7/V', 'Ger65', 'I')).toEqual({
      status: 0,
      out: [
        'V7/V\tF A C Eb\troot F\tdominant-seventh\t7\tin Bb major',
        'Ger65\tCb Eb Gb A\troot A\taugmented-sixth-german\t6/5',
        'I\tEb G Bb\troot Eb\tmajor\t5/3',
      ],
      complaints: [],
    });
  });

  it.each([
    [['c# minor', 'vii°7'], 'vii°7\tB# D# F# A\troot B#\tdiminished-seventh\t7'],
    [['c#', 'minor', 'viio7'], 'viio7\tB# D# F# A\troot B#\tdiminished-seventh\t7'],
    [['c#', 'viio7'], 'viio7\tB# D# F# A\troot B#\tdiminished-seventh\t7'],
    [['Eb', 'V2'], 'V2\tAb Bb D F\troot Bb\tdominant-seventh\t4/2'],
    [['b', 'bII6'], 'bII6\tE G C\troot C\tmajor\t6'],
    [['C', 'Ped V'], 'Ped V\tG\troot G\tother\t-'],
  ])('%j prints %j', (args, line) => {
    expect(run(...args)).toEqual({ status: 0, out: [line], complaints: [] });
  });

  it('says of an unreadable numeral at which character it stopped and why, and gives 1', () => {
    const { status, out, complaints } = run('C', 'major', 'V7', 'VX', 'I');
    expect([status, out.length, complaints.length]).toEqual([1, 2, 1]);
    expect(complaints[0]).toMatch(/^VX\tcannot be read\. Stopped at “X” \(character 2\): expected /);
  });

  it.each([[[]], [['Eb major']], [['Eb', 'major']], [['H', 'V7']], [['V7']]])('%j is wrong usage and gives 2', (args) => {
    const { status, out, complaints } = run(...args);
    expect([status, out]).toEqual([2, []]);
    expect(complaints.join('\n')).toContain('usage: npm run --silent spell');
  });

  it('runs as a command', () => {
    const root = path.resolve(import.meta.dirname, '../../..');
    const { status, stdout } = spawnSync('npm', ['run', '--silent', 'spell', '--', 'D minor', 'N6', 'V8'], { cwd: root, encoding: 'utf8' });
    expect([status, stdout]).toEqual([1, 'N6\tG Bb Eb\troot Eb\tmajor\t6\n']);
  }, 60_000);
});
