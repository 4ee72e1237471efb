import { type Candidate, findTone, inversionOfBass } from './candidates';
import { type SpanSound } from './segments';
import { BINS, CHANNELS as CHANNEL_COUNT, type Slices } from './slices';
import { DOMINANT_SEVENTH as V7, MAJOR as TRIAD, TEMPLATES as ALL_TEMPLATES } from './templates';

/** Imported values are bound once here: they are read in the innermost loops. */
const CHANNELS = CHANNEL_COUNT;
const DOMINANT_SEVENTH = V7;
const MAJOR = TRIAD;
const TEMPLATES = ALL_TEMPLATES;

/**
 * The terms of a chord over a span, apart from any key: what each is called and what it says. Amounts are felt beats,
 * shares (0–1) or 0/1; weights come from weights.json.
 */
export const CHORD_TERMS = [
  ['root-plain', 'the root sounds'],
  ['root-stepping', 'the root sounds, but moves on by step'],
  ['root-ornamental', 'the root sounds only in passing'],
  ['third-plain', 'the third sounds'],
  ['third-stepping', 'the third sounds, but moves on by step'],
  ['third-ornamental', 'the third sounds only in passing'],
  ['fifth-plain', 'the fifth sounds'],
  ['fifth-stepping', 'the fifth sounds, but moves on by step'],
  ['fifth-ornamental', 'the fifth sounds only in passing'],
  ['seventh-plain', 'the seventh sounds'],
  ['seventh-stepping', 'the seventh sounds and moves on by step'],
  ['seventh-ornamental', 'the seventh sounds only in passing'],
  ['foreign-plain', 'notes foreign to the chord stand plainly'],
  ['foreign-stepping', 'foreign notes move on by step'],
  ['foreign-ornamental', 'foreign notes are approached and left by step'],
  ['foreign-on-beats', 'foreign notes are struck on beats'],
  ['foreign-strikes', 'foreign notes are struck'],
  ['ninth-over-dominant', 'a ninth sounds over the dominant seventh'],
  ['suspended-fourth', 'a fourth stands where the third will come'],
  ['misspelled', 'a tone of the chord is written enharmonically'],
  ['root-missing', 'the root does not sound'],
  ['third-missing', 'the third does not sound'],
  ['fifth-missing', 'the fifth does not sound'],
  ['seventh-missing', 'the seventh does not sound'],
  ['all-explained', 'every note belongs to the chord'],
  ['bass-agrees', 'the bass has the tone of this inversion'],
  ['bass-agrees-first', 'the span begins on the bass of this inversion'],
  ['bass-other-tone', 'the bass has another tone of the chord'],
  ['bass-foreign', 'the bass is foreign to the chord'],
  ['bass-never', 'the bass of this inversion is never heard'],
  ['seventh-share', 'the seventh lasts through the span'],
  ['seventh-at-start', 'the seventh is there from the start'],
  ['seventh-late', 'the seventh enters late'],
  ['minor-seventh-left-out', 'a minor seventh sounds above a plain major triad'],
  ['seventh-left-out', 'a seventh sounds above a plain triad'],
  ['root-at-start', 'the root is there from the start'],
  ['third-at-start', 'the third is there from the start'],
  ['foreign-at-start', 'the span begins with a foreign note'],
  ['foreign-at-end', 'the span ends with a foreign note'],
  ['length-seventh', 'a seventh chord lasts long'],
  ['length-inverted', 'an inversion lasts long'],
  ['length-six-four', 'a six-four lasts long'],
  ['kind-major', 'a major triad'],
  ['kind-minor', 'a minor triad'],
  ['kind-diminished', 'a diminished triad'],
  ['kind-augmented', 'an augmented triad'],
  ['kind-dominant-seventh', 'a dominant seventh'],
  ['kind-major-seventh', 'a major seventh'],
  ['kind-minor-seventh', 'a minor seventh'],
  ['kind-half-diminished', 'a half-diminished seventh'],
  ['kind-diminished-seventh', 'a diminished seventh'],
  ['kind-minor-major-seventh', 'a minor triad with a major seventh'],
  ['kind-augmented-major-seventh', 'an augmented triad with a major seventh'],
  ['kind-italian', 'an Italian sixth'],
  ['kind-french', 'a French sixth'],
  ['kind-german', 'a German sixth'],
  ['kind-augmented-seventh', 'a seventh with raised fifth'],
  ['span', 'one more chord'],
  ['starts-downbeat', 'it begins on the downbeat'],
  ['starts-half-bar', 'it begins on the half-bar'],
  ['starts-beat', 'it begins on a beat'],
  ['starts-half-beat', 'it begins between beats'],
  ['starts-off', 'it begins off every beat'],
  ['starts-with-bass', 'the bass moves where it begins'],
  ['starts-without-attack', 'nothing is struck where it begins'],
  ['starts-with-new-notes', 'new notes come where it begins'],
  ['starts-with-many-attacks', 'the voices move together where it begins'],
  ['ends-same-bass', 'the bass stays where it ends'],
  ['length-log', 'its length'],
  ['length-under-beat', 'it is shorter than a beat'],
  ['length-beat', 'it lasts one beat'],
  ['length-bar', 'it fills the bar'],
] as const;

export const CHORD_TERM_COUNT = CHORD_TERMS.length;
type TermName = (typeof CHORD_TERMS)[number][0];

const AT = Object.fromEntries(CHORD_TERMS.map(([name], i) => [name, i])) as Readonly<Record<TermName, number>>;

/** Fills `row` with the terms of the span alone (its place, length and edges), the same for every chord of it. */
export function fillSpanTerms(row: Float32Array, sound: SpanSound, slices: Slices, j: number, e: number): void {
  const level = slices.level[j]!;
  row[AT.span] = 1;
  row[AT['starts-downbeat'] + level] = 1;
  const before = j > 0 ? slices.bass[j - 1]! : -1;
  row[AT['starts-with-bass']] = before !== slices.bass[j] ? 1 : 0;
  row[AT['starts-without-attack']] = slices.attacks[j] === 0 ? 1 : 0;
  row[AT['starts-with-new-notes']] = j === 0 ? 1 : shareOfNewNotes(slices, j);
  row[AT['starts-with-many-attacks']] = slices.attacks[j]! >= 3 ? 1 : 0;
  row[AT['ends-same-bass']] = e < slices.count && slices.bass[e] === slices.bass[e - 1] ? 1 : 0;
  row[AT['length-log']] = Math.log2(Math.max(0.125, sound.beats));
  row[AT['length-under-beat']] = sound.beats < 0.99 ? 1 : 0;
  row[AT['length-beat']] = Math.abs(sound.beats - 1) < 0.01 ? 1 : 0;
  row[AT['length-bar']] = startsBar(slices, j) && endsBar(slices, e) ? 1 : 0;
}

function startsBar(slices: Slices, j: number): boolean {
  return j === 0 || slices.bar[j - 1] !== slices.bar[j];
}

function endsBar(slices: Slices, e: number): boolean {
  return e === slices.count || slices.bar[e] !== slices.bar[e - 1];
}

/** Share of the pitches at the slice's start that did not sound in the slice before. */
function shareOfNewNotes(slices: Slices, j: number): number {
  const from = slices.first[j]!;
  let all = 0;
  let fresh = 0;
  for (let p = from; p < slices.first[j + 1]!; p++) {
    if (slices.atStart[p] === 0) continue;
    all++;
    let heard = false;
    for (let q = slices.first[j - 1]!; q < from; q++) heard ||= slices.bin[q] === slices.bin[p];
    if (!heard) fresh++;
  }
  return all ? fresh / all : 0;
}

/** The bins of a chord's tones as they sound, −1 for those that do not; reused between calls. */
const tonesFound = new Int32Array(4);
const belongs = new Uint8Array(BINS);

/** Fills `row` with the terms of a chord over the gathered span. The row's span terms must be there already. */
export function fillChordTerms(row: Float32Array, sound: SpanSound, chord: Candidate): void {
  const template = TEMPLATES[chord.kind]!;
  row[AT['kind-major'] + chord.kind] = 1;
  for (let i = 0; i < template.tones.length; i++) fillTone(row, sound, chord.root + template.tones[i]!, i);
  for (let i = template.tones.length; i < 4; i++) tonesFound[i] = -1;
  for (let i = 0; i < 4; i++) if (tonesFound[i]! >= 0) belongs[tonesFound[i]!] = 1;
  fillForeign(row, sound, chord);
  fillBass(row, sound, chord);
  fillSeventh(row, sound, chord);
  row[AT['root-at-start']] = tonesFound[0]! >= 0 ? sound.atStart[tonesFound[0]!]! : 0;
  row[AT['third-at-start']] = tonesFound[1]! >= 0 ? sound.atStart[tonesFound[1]!]! : 0;
  for (let i = 0; i < 4; i++) if (tonesFound[i]! >= 0) belongs[tonesFound[i]!] = 0;
  const log = row[AT['length-log']]!;
  if (template.isSeventh) row[AT['length-seventh']] = log;
  if (chord.inversion > 0) row[AT['length-inverted']] = log;
  if (chord.inversion === 2 && template.tones.length === 3) row[AT['length-six-four']] = log;
}

function fillTone(row: Float32Array, sound: SpanSound, bin: number, role: number): void {
  const found = findTone(sound, bin);
  tonesFound[role] = found;
  if (found < 0) {
    row[AT['root-missing'] + role] = 1;
    return;
  }
  if (found !== bin) row[AT.misspelled] = row[AT.misspelled]! + 1;
  const at = AT['root-plain'] + role * CHANNELS;
  for (let channel = 0; channel < CHANNELS; channel++) row[at + channel] = sound.sounding[found * CHANNELS + channel]!;
}

function fillForeign(row: Float32Array, sound: SpanSound, chord: Candidate): void {
  let foreign = 0;
  for (const bin of sound.bins) {
    if (belongs[bin] === 1) continue;
    foreign++;
    for (let channel = 0; channel < CHANNELS; channel++) {
      const at = AT['foreign-plain'] + channel;
      row[at] = row[at]! + sound.sounding[bin * CHANNELS + channel]!;
    }
    row[AT['foreign-on-beats']] = row[AT['foreign-on-beats']]! + sound.attacks[bin]!;
    row[AT['foreign-strikes']] = row[AT['foreign-strikes']]! + sound.strikes[bin]!;
    if (sound.atStart[bin] === 1) row[AT['foreign-at-start']] = 1;
    if (sound.atEnd[bin] === 1) row[AT['foreign-at-end']] = 1;
    fillSpecialForeign(row, sound, chord, bin);
  }
  if (foreign === 0 && sound.bins.length > 0) row[AT['all-explained']] = 1;
}

function fillSpecialForeign(row: Float32Array, sound: SpanSound, chord: Candidate, bin: number): void {
  const interval = bin - chord.root;
  if (chord.kind === DOMINANT_SEVENTH && (interval === 2 || interval === -5)) {
    row[AT['ninth-over-dominant']] = row[AT['ninth-over-dominant']]! + sound.total[bin]!;
  }
  const third = tonesFound[1]!;
  if (interval === -1 && (third < 0 || sound.enters[third]! > sound.enters[bin]!)) row[AT['suspended-fourth']] = sound.total[bin]!;
  if (TEMPLATES[chord.kind]!.tones.length !== 3) return;
  const share = sound.total[bin]! / Math.max(1e-6, sound.beats);
  if (chord.kind === MAJOR && interval === -2) row[AT['minor-seventh-left-out']] = share;
  else if (interval === -2 || interval === 5 || interval === -9) row[AT['seventh-left-out']] = share;
}

function fillBass(row: Float32Array, sound: SpanSound, chord: Candidate): void {
  if (sound.firstBass < 0) return;
  const beats = Math.max(1e-6, sound.beats);
  let own = 0;
  let other = 0;
  for (let i = 0; i < TEMPLATES[chord.kind]!.tones.length; i++) {
    const tone = tonesFound[i]! >= 0 ? tonesFound[i]! : chord.root + TEMPLATES[chord.kind]!.tones[i]!;
    const share = (sound.bass[tone] ?? 0) / beats;
    if (i === chord.inversion) own += share;
    else other += share;
  }
  row[AT['bass-agrees']] = own;
  row[AT['bass-other-tone']] = other;
  row[AT['bass-foreign']] = Math.max(0, 1 - own - other);
  row[AT['bass-never']] = own === 0 ? 1 : 0;
  row[AT['bass-agrees-first']] = inversionOfBass(chord.root, chord.kind, sound.firstBass) === chord.inversion ? 1 : 0;
}

function fillSeventh(row: Float32Array, sound: SpanSound, chord: Candidate): void {
  if (!TEMPLATES[chord.kind]!.isSeventh || tonesFound[3]! < 0) return;
  const bin = tonesFound[3]!;
  const beats = Math.max(1e-6, sound.beats);
  row[AT['seventh-share']] = sound.total[bin]! / beats;
  row[AT['seventh-at-start']] = sound.atStart[bin]!;
  row[AT['seventh-late']] = sound.enters[bin]! >= sound.beats / 2 - 1e-6 ? 1 : 0;
}

/** The weights before any learning: set by hand, in the order of magnitude that a teacher would give them. */
export const HAND_CHORD_WEIGHTS: Readonly<Partial<Record<TermName, number>>> = {
  'root-plain': 0.81, 'root-stepping': 0.51, 'root-ornamental': 0.34,
  'third-plain': 0.63, 'third-stepping': 0.48, 'third-ornamental': 0.35,
  'fifth-plain': 0.7, 'fifth-stepping': 0.48, 'fifth-ornamental': 0.36,
  'seventh-plain': 0.6, 'seventh-stepping': 0.44, 'seventh-ornamental': 0.27,
  'foreign-plain': -0.68, 'foreign-stepping': -0.46, 'foreign-ornamental': -0.38,
  'foreign-on-beats': -0.05,
  'ninth-over-dominant': 0.4, 'suspended-fourth': 0.3, misspelled: -0.3,
  'root-missing': -1.2, 'third-missing': -0.7, 'fifth-missing': -0.3, 'seventh-missing': -1.3,
  'all-explained': 0.4, 'bass-agrees': 0.83, 'bass-agrees-first': 0.3, 'bass-foreign': -0.3, 'bass-never': -0.4,
  'seventh-late': -0.1, 'minor-seventh-left-out': -0.1,
  'foreign-at-start': -0.1, 'foreign-at-end': 0,
  'length-seventh': -0.14, 'length-inverted': -0.14,
  span: -1.1, 'starts-downbeat': 0.5, 'starts-half-bar': 0.07, 'starts-beat': 0.05, 'starts-half-beat': -0.9, 'starts-off': -1.5,
  'starts-with-bass': 0.2, 'starts-without-attack': -0.5, 'starts-with-new-notes': 0.2,
};
