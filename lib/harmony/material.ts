import { type Candidate, CandidateFinder } from './candidates';
import { CHORD_TERM_COUNT as TERM_COUNT, fillChordTerms } from './chord-terms';
import { type KeyEvidence } from './key-terms';
import { type Segments, SpanSound, enumerateSegments } from './segments';
import { CHANNELS as CHANNEL_COUNT, type Slices } from './slices';
import { SPAN_TERM_COUNT, fillSpanTerms } from './span-terms';

const CHORD_TERM_COUNT = TERM_COUNT;
const CHANNELS = CHANNEL_COUNT;

/**
 * All that the search weighs in an excerpt, before any weight: spans with their candidate chords and terms. Candidates of
 * segment s are `candidateFrom[s]` to `candidateFrom[s + 1]`; candidate c's terms are the row of CHORD_TERM_COUNT from
 * `c · CHORD_TERM_COUNT`, segment s's own terms that of SPAN_TERM_COUNT from `s · SPAN_TERM_COUNT`. Sounds of segment s stand from `soundFrom[s]`: bin, plain beats, beats of moving notes.
 */
export interface Material {
  readonly slices: Slices;
  readonly segments: Segments;
  readonly evidence: KeyEvidence;
  readonly candidateFrom: Int32Array;
  readonly root: Uint8Array;
  readonly kind: Uint8Array;
  readonly inversion: Uint8Array;
  readonly terms: Float32Array;
  readonly spanTerms: Float32Array;
  readonly soundFrom: Int32Array;
  readonly soundBin: Uint8Array;
  readonly soundPlain: Float32Array;
  readonly soundMoving: Float32Array;
}

/** Chords that must be among the candidates of a span: what a person fixed, or what a reference says in training. */
export type WantedChords = (j: number, e: number) => readonly Candidate[];

export interface MaterialOptions {
  readonly candidates: number;
  readonly wanted?: WantedChords;
}

export function gatherMaterial(slices: Slices, evidence: KeyEvidence, options: MaterialOptions): Material {
  const segments = enumerateSegments(slices);
  const gathering = new Gathering(segments.count, options);
  const sound = new SpanSound();
  let started = -1;
  for (let s = 0; s < segments.count; s++) {
    const j = segments.start[s]!;
    if (j !== started) {
      sound.reset();
      started = j;
    }
    sound.addSlice(slices, segments.end[s]! - 1);
    gathering.addSegment(sound, slices, j, segments.end[s]!);
  }
  return { slices, segments, evidence, ...gathering.finish() };
}

class Gathering {
  private readonly candidateFrom: Int32Array;
  private readonly soundFrom: Int32Array;
  private readonly chords: Candidate[] = [];
  private readonly soundBin: number[] = [];
  private readonly soundPlain: number[] = [];
  private readonly soundMoving: number[] = [];
  private terms = new Float32Array(CHORD_TERM_COUNT * 4096);
  private segment = 0;
  private readonly spanTerms: Float32Array;

  private readonly finder: CandidateFinder;

  constructor(segments: number, private readonly options: MaterialOptions) {
    this.finder = new CandidateFinder(options.candidates);
    this.candidateFrom = new Int32Array(segments + 1);
    this.spanTerms = new Float32Array(segments * SPAN_TERM_COUNT);
    this.soundFrom = new Int32Array(segments + 1);
  }

  addSegment(sound: SpanSound, slices: Slices, j: number, e: number): void {
    const chords = withWanted(this.finder.find(sound), this.options.wanted?.(j, e) ?? []);
    const place = this.segment * SPAN_TERM_COUNT;
    fillSpanTerms(this.spanTerms.subarray(place, place + SPAN_TERM_COUNT), sound, slices, j, e);
    this.reserve(this.chords.length + chords.length);
    for (const chord of chords) {
      const at = this.chords.length * CHORD_TERM_COUNT;
      fillChordTerms(this.terms.subarray(at, at + CHORD_TERM_COUNT), sound, slices, e, chord);
      this.chords.push(chord);
    }
    this.addSound(sound);
    this.segment++;
    this.candidateFrom[this.segment] = this.chords.length;
    this.soundFrom[this.segment] = this.soundBin.length;
  }

  private addSound(sound: SpanSound): void {
    for (const bin of sound.bins) {
      this.soundBin.push(bin);
      this.soundPlain.push(sound.sounding[bin * CHANNELS]!);
      this.soundMoving.push(sound.sounding[bin * CHANNELS + 1]! + sound.sounding[bin * CHANNELS + 2]!);
    }
  }

  private reserve(rows: number): void {
    if (rows * CHORD_TERM_COUNT <= this.terms.length) return;
    const larger = new Float32Array(Math.max(rows * CHORD_TERM_COUNT, this.terms.length * 2));
    larger.set(this.terms);
    this.terms = larger;
  }

  finish(): Omit<Material, 'slices' | 'segments' | 'evidence'> {
    return {
      candidateFrom: this.candidateFrom,
      root: Uint8Array.from(this.chords, (chord) => chord.root),
      kind: Uint8Array.from(this.chords, (chord) => chord.kind),
      inversion: Uint8Array.from(this.chords, (chord) => chord.inversion),
      terms: this.terms.slice(0, this.chords.length * CHORD_TERM_COUNT),
      spanTerms: this.spanTerms,
      soundFrom: this.soundFrom,
      soundBin: Uint8Array.from(this.soundBin),
      soundPlain: Float32Array.from(this.soundPlain),
      soundMoving: Float32Array.from(this.soundMoving),
    };
  }
}

function withWanted(found: readonly Candidate[], wanted: readonly Candidate[]): readonly Candidate[] {
  const missing = wanted.filter(
    (want) => !found.some((chord) => chord.root === want.root && chord.kind === want.kind && chord.inversion === want.inversion),
  );
  return missing.length ? [...found, ...missing] : found;
}
