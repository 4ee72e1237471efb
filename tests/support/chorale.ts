import { type Score } from '@/lib/score/score';
import { type Key } from '@/lib/theory/key';
import { type Numeral } from '@/lib/theory/numeral';
import { type Fifths, type Pitch, formatPitchClass, midiOf } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { scoreFrom } from './notation';

const BASS = { low: 40, high: 60, start: 48 } as const;
const UPPER = { low: 55, high: 79, start: [60, 64, 67] } as const;

/**
 * Numerals as block chords of four voices, a half note each (the last one a whole note): the bass as near as it can be to
 * the one before, the upper three by the shortest way. For tests that read them back; no check of parallels.
 */
export function realise(key: Key, numerals: readonly Numeral[]): Score {
  let bass: number = BASS.start;
  let upper: readonly number[] = UPPER.start;
  const sonorities = numerals.map((numeral, i) => {
    const { tones } = spellNumeral(key, numeral);
    const low = nearest(tones[0]!.fifths, bass, BASS.low, BASS.high);
    bass = midiOf(low);
    const chosen = voice(upperTones(tones.map((tone) => tone.fifths)), upper, bass);
    upper = chosen.map(midiOf);
    return `${[low, ...chosen].map(write).join(' ')} *${i + 1 === numerals.length ? 4 : 2}`;
  });
  return scoreFrom(`${tonicName(key)}: ${sonorities.join(' | ')}`);
}

function tonicName(key: Key): string {
  const tonic = formatPitchClass(key.tonic);
  return key.mode === 'major' ? tonic : tonic.charAt(0).toLowerCase() + tonic.slice(1);
}

function write(pitch: Pitch): string {
  return `${formatPitchClass(pitch.fifths).toLowerCase()}${pitch.octave}`;
}

/** Three tones for the upper voices: of a triad all of them, of a seventh chord what the bass does not have. */
function upperTones(tones: readonly Fifths[]): readonly Fifths[] {
  return tones.length > 3 ? tones.slice(1) : tones;
}

function octavesOf(f: Fifths, low: number, high: number): readonly Pitch[] {
  const all = [1, 2, 3, 4, 5, 6].map((octave): Pitch => ({ fifths: f, octave }));
  return all.filter((pitch) => midiOf(pitch) >= low && midiOf(pitch) <= high);
}

function nearest(f: Fifths, to: number, low: number, high: number): Pitch {
  const distance = (pitch: Pitch) => Math.abs(midiOf(pitch) - to);
  return octavesOf(f, low, high).reduce((best, pitch) => (distance(pitch) < distance(best) ? pitch : best));
}

function voice(tones: readonly Fifths[], before: readonly number[], bass: number): readonly Pitch[] {
  let best: readonly Pitch[] = [];
  let least = Infinity;
  for (const [a, b, c] of [[0, 1, 2], [0, 2, 1], [1, 0, 2], [1, 2, 0], [2, 0, 1], [2, 1, 0]] as const) {
    for (const low of octavesOf(tones[a]!, Math.max(UPPER.low, bass + 1), UPPER.high)) {
      for (const middle of octavesOf(tones[b]!, midiOf(low) + 1, midiOf(low) + 12)) {
        for (const high of octavesOf(tones[c]!, midiOf(middle) + 1, Math.min(midiOf(middle) + 12, UPPER.high))) {
          const pitches = [low, middle, high];
          const moved = pitches.reduce((sum, pitch, i) => sum + Math.abs(midiOf(pitch) - before[i]!), 0);
          if (moved < least) [best, least] = [pitches, moved];
        }
      }
    }
  }
  return best;
}

