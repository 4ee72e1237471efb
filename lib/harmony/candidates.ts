import { BINS as BIN_COUNT, CHANNELS } from './slices';
import { type SpanSound } from './segments';
import { KIND_COUNT as KINDS, TEMPLATES } from './templates';

/** Fifths between two spellings of one key on the keyboard. */
export const ENHARMONIC = 12;

/** A chord that might be meant by a span: root bin, kind, inversion; `rank` is the cheap score that chose it. */
export interface Candidate {
  readonly root: number;
  readonly kind: number;
  readonly inversion: number;
  readonly rank: number;
}

const BINS = BIN_COUNT;
const KIND_COUNT = KINDS;
const STEP = ENHARMONIC;
const MISSING_COST = [1.4, 0.7, 0.3, 1.6] as const;
const MISSPELLING_COST = 0.25;
const BASS_BONUS = 0.9;
const LOWEST_BONUS = 0.4;
const ROOT_BONUS = 0.25;
const NO_BASS_COST = 0.5;
const SEVENTH_COST = 0.35;
const STEPPING = 0.7;
const ORNAMENTAL = 0.4;
const CHANNEL_COUNT = CHANNELS;
const LOWEST_RANK = -4;
/** Room below bin 0 and above the last, so that a chord's tones need no bounds. */
const PAD = 24;

const SIZES = Uint8Array.from(TEMPLATES, (template) => template.tones.length);
const TONES = new Int8Array(KIND_COUNT * 4);
TEMPLATES.forEach((template, kind) => template.tones.forEach((tone, i) => (TONES[kind * 4 + i] = tone)));

/** The bin in which a chord tone sounds: as spelled, else misspelled by an enharmonic step; −1 when it does not sound. */
export function findTone(sound: SpanSound, bin: number): number {
  if (bin >= 0 && bin < BINS && sound.total[bin]! > 0) return bin;
  if (bin + STEP < BINS && sound.total[bin + STEP]! > 0) return bin + STEP;
  if (bin >= STEP && sound.total[bin - STEP]! > 0) return bin - STEP;
  return -1;
}

/** Held bass as a tone of the chord: the inversion it makes, or −1. */
export function inversionOfBass(root: number, kind: number, bass: number): number {
  for (let i = 0; i < SIZES[kind]!; i++) if ((root + TONES[kind * 4 + i]! - bass) % STEP === 0) return i;
  return -1;
}

/** Beats of a bin; what moves on by step counts less, and less again what comes by step as well. */
function weigh(sound: SpanSound, bin: number): number {
  const at = bin * CHANNEL_COUNT;
  return sound.sounding[at]! + STEPPING * sound.sounding[at + 1]! + ORNAMENTAL * sound.sounding[at + 2]!;
}

/** Finds the best chords of spans; keeps its working arrays between calls. */
export class CandidateFinder {
  /** Beats of the tone at a bin, as spelled or enharmonically; and whether it is misspelled. */
  private readonly heard = new Float64Array(BINS + 2 * PAD);
  private readonly misspelled = new Uint8Array(BINS + 2 * PAD);
  private readonly bass = new Float64Array(BINS + 2 * PAD);
  private lowest = -1;
  private readonly isRoot = new Uint8Array(BINS + 2 * PAD);
  private readonly code: Int32Array;
  private readonly rank: Float64Array;
  private size = 0;

  constructor(private readonly limit: number) {
    this.code = new Int32Array(limit + 1);
    this.rank = new Float64Array(limit + 1);
  }

  /** The best chords of a span, best first. Empty when nothing sounds. */
  find(sound: SpanSound): readonly Candidate[] {
    this.size = 0;
    this.listen(sound);
    let all = 0;
    for (const bin of sound.bins) all += weigh(sound, bin);
    const scale = 1 / Math.max(0.7, Math.sqrt(sound.beats));
    for (const bin of sound.bins) for (const root of [bin, bin - 1, bin - 4, bin + 3]) this.tryRoot(root, all, scale, sound.beats);
    this.forget(sound);
    const found: Candidate[] = [];
    for (let i = 0; i < this.size; i++) {
      const code = this.code[i]!;
      found.push({ root: (code >> 2) % BINS, kind: Math.floor((code >> 2) / BINS), inversion: code & 3, rank: this.rank[i]! });
    }
    return found;
  }

  private listen(sound: SpanSound): void {
    const { heard, misspelled, bass } = this;
    this.lowest = sound.lowest;
    for (const bin of sound.bins) {
      for (const other of [bin - STEP, bin + STEP]) {
        if (other < -PAD || other >= BINS + PAD || heard[other + PAD]! > 0) continue;
        heard[other + PAD] = weigh(sound, bin);
        misspelled[other + PAD] = 1;
        bass[other + PAD] = sound.bass[bin]!;
      }
    }
    for (const bin of sound.bins) {
      heard[bin + PAD] = weigh(sound, bin);
      misspelled[bin + PAD] = 0;
      bass[bin + PAD] = sound.bass[bin]!;
    }
  }

  private forget(sound: SpanSound): void {
    for (const bin of sound.bins) {
      for (const other of [bin - STEP, bin, bin + STEP]) {
        if (other < -PAD || other >= BINS + PAD) continue;
        this.heard[other + PAD] = 0;
        this.misspelled[other + PAD] = 0;
        this.bass[other + PAD] = 0;
      }
      for (const root of [bin, bin - 1, bin - 4, bin + 3]) this.isRoot[root + PAD] = 0;
    }
  }

  private tryRoot(root: number, all: number, scale: number, beats: number): void {
    if (root < 0 || root >= BINS || this.isRoot[root + PAD] === 1) return;
    this.isRoot[root + PAD] = 1;
    const { heard, misspelled } = this;
    for (let kind = 0; kind < KIND_COUNT; kind++) {
      const tones = SIZES[kind]!;
      let explained = 0;
      let cost = tones > 3 ? SEVENTH_COST : 0;
      for (let i = 0; i < tones; i++) {
        const at = root + TONES[kind * 4 + i]! + PAD;
        const amount = heard[at]!;
        if (amount === 0) cost += MISSING_COST[i]!;
        else {
          explained += amount;
          if (misspelled[at] === 1) cost += MISSPELLING_COST;
        }
      }
      const rank = (2 * explained - all) * scale - cost;
      if (rank > LOWEST_RANK && (this.size < this.limit || rank + BASS_BONUS + LOWEST_BONUS + ROOT_BONUS > this.rank[this.size - 1]!)) this.tryInversions(root, kind, rank, beats);
    }
  }

  private tryInversions(root: number, kind: number, rank: number, beats: number): void {
    for (let inversion = 0; inversion < SIZES[kind]!; inversion++) {
      const at = root + TONES[kind * 4 + inversion]! + PAD;
      const share = this.bass[at]! / Math.max(1e-6, beats);
      if (share === 0 && inversion > 0 && this.heard[at] === 0) continue;
      const isLowest = this.lowest >= 0 && (at - PAD - this.lowest) % STEP === 0;
      const bonus = (share > 0 ? BASS_BONUS * share : -NO_BASS_COST) + (isLowest ? LOWEST_BONUS : 0) + (inversion === 0 ? ROOT_BONUS : 0);
      this.insert(((kind * BINS + root) << 2) | inversion, rank + bonus);
    }
  }

  private insert(code: number, rank: number): void {
    if (this.size === this.limit && rank <= this.rank[this.size - 1]!) return;
    let i = this.size < this.limit ? this.size++ : this.size - 1;
    for (; i > 0 && this.rank[i - 1]! < rank; i--) {
      this.rank[i] = this.rank[i - 1]!;
      this.code[i] = this.code[i - 1]!;
    }
    this.rank[i] = rank;
    this.code[i] = code;
  }
}
