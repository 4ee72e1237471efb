import { note, partwise } from './musicxml';

/** Divisions of the quarter in the score: halves are 4. */
const DIVISIONS = 2;

/** Four bars that come again and again: a chord to each half, from the cello up, in C. */
const CHORDS = [
  ['C3', 'G3', 'E4', 'C5'],
  ['F3', 'A3', 'F4', 'C5'],
  ['G2', 'B3', 'G4', 'D5'],
  ['G2', 'B3', 'F4', 'D5'],
  ['C3', 'G3', 'E4', 'C5'],
  ['D3', 'A3', 'F4', 'D5'],
  ['G2', 'G3', 'D4', 'B4'],
  ['C3', 'G3', 'E4', 'C5'],
] as const;

/** A string quartet of so many bars, invented: a new chord at each half, two quarters to each in the violins. */
export function quartetXml(bars: number, title = 'A long quartet'): string {
  const parts = [3, 2, 1, 0].map((voice) => Array.from({ length: bars }, (_, bar) => [CHORDS[(bar * 2) % 8], CHORDS[(bar * 2 + 1) % 8]].map((chord) => played(chord?.[voice] as string, voice)).join('')));
  const opened = parts.map(([first = '', ...rest], i) => [opening(CLEFS[i] as string) + first, ...rest]);
  return partwise(...opened).replace('<part-list>', `<work><work-title>${title}</work-title></work><part-list>`);
}

const CLEFS = ['<sign>G</sign><line>2</line>', '<sign>G</sign><line>2</line>', '<sign>C</sign><line>3</line>', '<sign>F</sign><line>4</line>'];

function opening(clef: string): string {
  return `<attributes><divisions>${DIVISIONS}</divisions><key><fifths>0</fifths></key><time><beats>4</beats><beat-type>4</beat-type></time><clef>${clef}</clef></attributes>`;
}

function played(pitch: string, voice: number): string {
  if (voice < 2) return note(pitch, { duration: 2 * DIVISIONS, after: '<type>half</type>' });
  return [0, 1].map(() => note(pitch, { duration: DIVISIONS, after: '<type>quarter</type>' })).join('');
}
