import type { DemoPieceName } from './index';

/**
 * Our own readings of the demo's pieces, written by hand with the pieces and independent of the engine. Bars are parted
 * by ` | `; a token is a numeral, `*n` gives its length in quarters (1 without); `G:` or `e:` changes the key, capitals
 * for major. The prelude's reading is the traditional one; bars 26 and 30 are read as suspensions over the dominant.
 */
export const DEMO_READINGS: Readonly<Record<DemoPieceName, string>> = {
  eveningHymn: [
    'G: I V6 I vi | ii6 viiø7/V V*2 | V42 I6 vii°65/vi vi6 | ii65 V7 I*2',
    'I vii°7/ii ii viiø65/V | V6 vii°7/vi vi*2 | IV vii°7/V Cad64 V7 | vi*2 ii6 V',
    'e: i iiø65 V i | VI iv6 V*2 | vii°65 G: vi6 ii V65/V | V*3 V42',
    'I6 V65/IV IV iv | Cad64 V7 vii°7/vi vi | ii65 vii°7/V Cad64 V7 | I*4',
  ].join(' | '),
  staircase: [
    'D: I*2 V6 | I vii°7/ii*2 | ii*2 vii°7/iii | iii*3 | vii°7/IV*2 IV | viiø65/V*2 V6 | vii°7/vi*2 vi',
    'IV vii°7/V*2 | Cad64*2 V7 | vi*2 V65/IV | IV*2 iv | Cad64 V7*2 | I*3',
  ].join(' | '),
  minuet: [
    'c: i*3 | i*3 | vii°65*3 | i6*3 | iv*3 | vii°7/V*3 | V*3 | V*3',
    'V65/iv*3 | iv*3 | vii°7/III*3 | III*3 | N6*3 | vii°7/V*3 | Cad64 V7*2 | i*3',
    'VI*3 | Ger65*3 | Cad64*3 | V7*3 | VI*3 | N6*2 vii°7/V | Cad64 V7*2 | i*3',
  ].join(' | '),
  song: [
    'Eb: I*4 | I6*2 vii°7/ii*2 | ii*4 | V7*2 I*2 | I*2 vii°7/vi*2 | vi*2 viiø7/V*2 | V*2 V42*2 | I6*4 | IV*2 iv*2',
    'I*2 CT°7*2 | I*4 | vii°7/V*2 Cad64*2 | V7*4 | vi*2 vii°7/ii*2 | ii*2 vii°7/V*2 | Cad64*2 V7*2 | I*2 iv64*2 | I*4',
  ].join(' | '),
  romance: [
    'f: i*3 | iv6*3 | vii°43*3 | i6*3 | vii°7/iv*3 | iv*3 | vii°7/V*3 | V*3',
    'Ab: vii°7*3 | I*3 | vii°7/vi*3 | vi*3 | ii65*1.5 V7*1.5 | I*3',
    'f: iiø65*3 | V*3 | N6*3 | Cad64*1.5 V7*1.5 | i*3 | i*3',
  ].join(' | '),
  prelude: [
    'C: I*4 | ii42*4 | V65*4 | I*4 | vi6*4 | V42/V*4 | V6*4 | I42*4 | vi7*4 | V7/V*4 | V*4',
    'vii°43/ii*4 | ii6*4 | vii°43*4 | I6*4 | IV42*4 | ii7*4 | V7*4 | I*4 | V7/IV*4 | IV7*4 | vii°7/V*4 | vii°42*4',
    'V7*4 | Cad64*4 | V7sus4*4 | V7*4 | vii°7/V*4 | Cad64*4 | V7sus4*4 | V7*4 | V7/IV*4 | IV64*4 | V7*4 | I*4',
  ].join(' | '),
};
