import { type Candidate, findTone as importedFindTone, inversionOfBass as importedInversionOfBass } from './candidates';
import { type SpanSound } from './segments';
import { BINS, CHANNELS as CHANNEL_COUNT, type Slices } from './slices';
import { DOMINANT_SEVENTH as V7, MAJOR as TRIAD, TEMPLATES as ALL_TEMPLATES } from './templates';

const findTone = importedFindTone;
const inversionOfBass = importedInversionOfBass;

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
  ['lowest-agrees', 'the lowest note of the span has the tone of this inversion'],
  ['lowest-agrees-first', 'the span begins with the tone of this inversion lowest'],
  ['bass-agrees-last', 'the span ends on the bass of this inversion'],
  ['foreign-held-over', 'a foreign note is held over from before and moves on by step'],
  ['foreign-anticipates', 'a foreign note at the end belongs to what follows'],
  ['pedal-length', 'the bass is foreign and stays'],
  ['pedal-upper-bass', 'above a foreign bass the lowest note has the tone of this inversion'],
  ['complete', 'all tones of the chord sound'],
  ['foreign-share', 'share of the sound that is foreign and stands plainly'],
  ['dominant-seventh-share', 'the seventh of the dominant seventh lasts through the span'],
  ['dominant-seventh-at-start', 'the seventh of the dominant seventh is there from the start'],
  ['dominant-seventh-late', 'the seventh of the dominant seventh enters late'],
  ['dominant-seventh-resolves', 'the seventh of the dominant seventh goes down by step at the end'],
  ['seventh-resolves', 'the seventh goes down by step at the end'],
  ['seventh-stays', 'the seventh stays where the chord ends'],
  ['seventh-on-beat', 'the seventh is struck on a beat'],
  ['seventh-moves', 'the seventh only passes through'],
  ['minor-seventh-left-out-plain', 'a minor seventh stands plainly above a plain major triad'],
  ['minor-seventh-left-out-early', 'a minor seventh above a plain major triad is there from the start'],
  ['minor-seventh-left-out-on-beat', 'a minor seventh above a plain major triad is struck on a beat'],
  ['fifth-missing-seventh', 'a seventh chord without its fifth'],
] as const;

export const CHORD_TERM_COUNT = CHORD_TERMS.length;
type TermName = (typeof CHORD_TERMS)[number][0];

const AT = Object.fromEntries(CHORD_TERMS.map(([name], i) => [name, i])) as Readonly<Record<TermName, number>>;

/** The bins of a chord's tones as they sound, −1 for those that do not; reused between calls. */
const tonesFound = new Int32Array(4);
const belongs = new Uint8Array(BINS);

/** Fills `row` with the terms of a chord over the gathered span. `row` holds zeros before; `e` is the slice after the span. */
export function fillChordTerms(row: Float32Array, sound: SpanSound, slices: Slices, e: number, chord: Candidate): void {
  const template = TEMPLATES[chord.kind]!;
  row[AT['kind-major'] + chord.kind] = 1;
  for (let i = 0; i < template.tones.length; i++) fillTone(row, sound, chord.root + template.tones[i]!, i);
  for (let i = template.tones.length; i < 4; i++) tonesFound[i] = -1;
  for (let i = 0; i < 4; i++) if (tonesFound[i]! >= 0) belongs[tonesFound[i]!] = 1;
  fillForeign(row, sound, slices, e, chord);
  fillBass(row, sound, chord);
  fillSeventh(row, sound, slices, e, chord);
  fillWhole(row, template.tones.length);
  row[AT['root-at-start']] = tonesFound[0]! >= 0 ? sound.atStart[tonesFound[0]!]! : 0;
  row[AT['third-at-start']] = tonesFound[1]! >= 0 ? sound.atStart[tonesFound[1]!]! : 0;
  for (let i = 0; i < 4; i++) if (tonesFound[i]! >= 0) belongs[tonesFound[i]!] = 0;
  const log = Math.log2(Math.max(0.125, sound.beats));
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

function fillForeign(row: Float32Array, sound: SpanSound, slices: Slices, e: number, chord: Candidate): void {
  let foreign = 0;
  let all = 0;
  for (const bin of sound.bins) {
    all += sound.total[bin]!;
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
    if (sound.heldOver[bin] === 1 && sound.sounding[bin * CHANNELS]! === 0) row[AT['foreign-held-over']] = row[AT['foreign-held-over']]! + sound.total[bin]!;
    if (sound.atEnd[bin] === 1 && sound.atStart[bin] === 0 && startsWith(slices, e, bin)) row[AT['foreign-anticipates']] = 1;
    fillSpecialForeign(row, sound, chord, bin);
  }
  if (foreign === 0 && sound.bins.length > 0) row[AT['all-explained']] = 1;
  if (foreign > 0) row[AT['foreign-share']] = row[AT['foreign-plain']]! / Math.max(1e-6, all);
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
  if (chord.kind === MAJOR && interval === -2) {
    row[AT['minor-seventh-left-out']] = share;
    row[AT['minor-seventh-left-out-plain']] = sound.sounding[bin * CHANNELS]! / Math.max(1e-6, sound.beats);
    row[AT['minor-seventh-left-out-early']] = sound.atStart[bin]!;
    row[AT['minor-seventh-left-out-on-beat']] = sound.attacks[bin]! > 0 ? 1 : 0;
  }
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
  if (own + other === 0 && sound.firstBass === sound.lastBass) {
    row[AT['pedal-length']] = sound.beats;
    row[AT['pedal-upper-bass']] = inversionOfBass(chord.root, chord.kind, sound.aboveBass) === chord.inversion ? 1 : 0;
  }
  row[AT['bass-never']] = own === 0 ? 1 : 0;
  row[AT['lowest-agrees']] = inversionOfBass(chord.root, chord.kind, sound.lowest) === chord.inversion ? 1 : 0;
  row[AT['lowest-agrees-first']] = inversionOfBass(chord.root, chord.kind, sound.lowestAtStart) === chord.inversion ? 1 : 0;
  row[AT['bass-agrees-last']] = inversionOfBass(chord.root, chord.kind, sound.lastBass) === chord.inversion ? 1 : 0;
  row[AT['bass-agrees-first']] = inversionOfBass(chord.root, chord.kind, sound.firstBass) === chord.inversion ? 1 : 0;
}

function fillSeventh(row: Float32Array, sound: SpanSound, slices: Slices, e: number, chord: Candidate): void {
  if (!TEMPLATES[chord.kind]!.isSeventh) return;
  if (tonesFound[2]! < 0) row[AT['fifth-missing-seventh']] = 1;
  if (tonesFound[3]! < 0) return;
  const bin = tonesFound[3]!;
  const share = sound.total[bin]! / Math.max(1e-6, sound.beats);
  const isLate = sound.enters[bin]! >= sound.beats / 2 - 1e-6 ? 1 : 0;
  row[AT['seventh-share']] = share;
  row[AT['seventh-at-start']] = sound.atStart[bin]!;
  row[AT['seventh-late']] = isLate;
  row[AT['seventh-on-beat']] = sound.attacks[bin]! > 0 ? 1 : 0;
  row[AT['seventh-moves']] = sound.sounding[bin * CHANNELS + 2]! / Math.max(1e-6, sound.total[bin]!);
  const resolves = goesDown(slices, e, bin) ? 1 : 0;
  row[AT['seventh-resolves']] = resolves;
  row[AT['seventh-stays']] = startsWith(slices, e, bin) ? 1 : 0;
  if (chord.kind !== DOMINANT_SEVENTH) return;
  row[AT['dominant-seventh-share']] = share;
  row[AT['dominant-seventh-at-start']] = sound.atStart[bin]!;
  row[AT['dominant-seventh-late']] = isLate;
  row[AT['dominant-seventh-resolves']] = resolves;
}

/** The note a half or whole step below sounds where the next span begins, and the note itself does not. */
function goesDown(slices: Slices, e: number, bin: number): boolean {
  return !startsWith(slices, e, bin) && (startsWith(slices, e, bin + 5) || startsWith(slices, e, bin - 2));
}

function startsWith(slices: Slices, e: number, bin: number): boolean {
  if (e >= slices.count) return false;
  for (let p = slices.first[e]!; p < slices.first[e + 1]!; p++) if (slices.bin[p] === bin && slices.atStart[p] === 1) return true;
  return false;
}

function fillWhole(row: Float32Array, tones: number): void {
  let heard = 0;
  for (let i = 0; i < tones; i++) if (tonesFound[i]! >= 0) heard++;
  if (heard === tones) row[AT.complete] = 1;
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
  'all-explained': 0.4, 'bass-agrees': 0.83, 'bass-agrees-first': 0.2, 'pedal-length': 0.2, 'pedal-upper-bass': 0.3, 'lowest-agrees': 0.3, 'bass-foreign': -0.3, 'bass-never': -0.4,
  'seventh-late': -0.1, 'minor-seventh-left-out': -0.1,
  'foreign-at-start': -0.1, 'foreign-at-end': 0,
  'length-seventh': -0.14, 'length-inverted': -0.14,
};
