import { type Score } from '../score/score';
import { CHORD_TERMS, CHORD_TERM_COUNT, fillChordTerms } from './chord-terms';
import { KEY_FACTS, KEY_FACT_COUNT, KEY_PROFILE_COUNT, type KeyEvidence, fillKeyFacts, keyNumber } from './key-terms';
import { scoreKeyAt } from './keys-tried';
import { LABEL_TERMS } from './label-terms';
import { stateOf } from './lattice';
import { type Material } from './material';
import { NodeTerms } from './node-terms';
import { gatherEvidence, gatherExcerpt } from './prepare';
import { type Label, type Reading, type Term } from './reading';
import { SpanSound } from './segments';
import { getShippedWeights } from './shipped-weights';
import { BIN_SHIFT, type Slices } from './slices';
import { SPAN_TERM_COUNT, fillSpanTerms } from './span-terms';
import { TRANSITION_TERMS } from './transition-terms';
import { Transitions } from './transitions';
import { LABELS, findLabel } from './vocabulary';
import { AT, type Weights } from './weights';

/** Terms that every chord of a span shares, or that only tell chords apart by name: no argument for a person. */
const BOOKKEEPING = /^(length-|kind-|bass-n|bass-[^afo]|all-)/;

interface Ground {
  readonly slices: Slices;
  readonly evidence: KeyEvidence;
}

const grounds = new WeakMap<Score, Ground>();

function groundOf(score: Score): Ground {
  const known = grounds.get(score);
  if (known) return known;
  const slices = gatherExcerpt(score);
  const ground = { slices, evidence: gatherEvidence(score, slices) };
  grounds.set(score, ground);
  return ground;
}

/** A label in the engine's terms, null for what the vocabulary lacks. */
function readState(label: Label): { state: number; key: number; id: number } | null {
  const { key, numeral } = label;
  const id = numeral ? findLabel(key.mode, numeral) : -1;
  if (!numeral || id < 0 || numeral.inversion > 3) return null;
  const number = keyNumber(key.tonic, key.mode === 'major' ? 0 : 1);
  return { state: stateOf(number, id, numeral.inversion), key: number, id };
}

/**
 * What the engine's sum says about a label: every named term with its weight times its amount, strongest first. Works for
 * labels that a person typed; [] when the vocabulary lacks the numeral or nothing sounds.
 */
export function weighLabel(score: Score, reading: Reading, i: number): readonly Term[] {
  const label = reading.labels[i]!;
  const own = readState(label);
  const { slices, evidence } = groundOf(score);
  const from = slices.start.findIndex((start) => start >= label.start);
  if (!own || from < 0 || slices.start[from]! >= label.end) return [];
  let to = from + 1;
  while (to < slices.count && slices.start[to]! < label.end) to++;
  const { weights } = getShippedWeights();
  const sums = new Map<string, { sentence: string; weight: number }>();
  const add = (name: string, sentence: string, weight: number) => {
    const known = sums.get(name);
    sums.set(name, { sentence, weight: (known?.weight ?? 0) + weight });
  };
  weighSpan({ slices, evidence }, label, own, from, to, weights, add);
  const neighbours = [reading.labels[i - 1], label, reading.labels[i + 1]];
  weighNeighbours({ slices, evidence }, neighbours, from, to, weights, add);
  return [...sums].map(([name, term]) => ({ name, ...term })).sort((a, b) => Math.abs(b.weight) - Math.abs(a.weight));
}

type AddTerm = (name: string, sentence: string, weight: number) => void;

function weighSpan(ground: Ground, label: Label, own: { key: number; id: number }, from: number, to: number, weights: Weights, add: AddTerm): void {
  const { slices, evidence } = ground;
  const sound = new SpanSound();
  for (let s = from; s < to; s++) sound.addSlice(slices, s);
  const { root, kind } = LABELS[own.id]!;
  const chord = { root: root + label.key.tonic + BIN_SHIFT, kind, inversion: label.numeral!.inversion, rank: 0 };
  const row = new Float32Array(CHORD_TERM_COUNT);
  fillChordTerms(row, sound, slices, to, chord);
  CHORD_TERMS.forEach(([name, sentence], t) => {
    if (row[t] === 0 || BOOKKEEPING.test(name)) return;
    const argument = joinFamily(name, sentence);
    add(argument.name, argument.sentence, row[t]! * weights.values[AT.chord + t]!);
  });
  weighKey(evidence, own.key, from, to, slices, weights, add);
  weighFrequency(ground, chord, own, from, to, weights, add);
}

/** Terms that are one argument to a reader: the ways in which a tone moves on, the places at which the bass is asked. */
const FAMILIES: readonly (readonly [members: RegExp, name: string, sentence: string | null])[] = [
  [/^foreign-/, 'foreign-sounds', 'notes foreign to the chord sound'],
  [/^(bass|lowest)-agrees/, 'bass-agrees', 'the bass has the tone of this inversion'],
  [/^(dominant-)?seventh-(share|at-start|late|resolves|stays|on-beat|moves)$/, 'seventh-place', 'when the seventh comes and where it goes'],
  [/^minor-seventh-left-out/, 'minor-seventh-left-out', 'a minor seventh sounds above a plain major triad'],
  [/-(plain|stepping|ornamental)$/, '-sounds', null],
];

function joinFamily(name: string, sentence: string): { name: string; sentence: string } {
  const family = FAMILIES.find(([members]) => members.test(name));
  if (!family) return { name, sentence };
  const [members, joined, said] = family;
  return said ? { name: joined, sentence: said } : { name: name.replace(members, joined), sentence: sentence.replace(/, but moves on by step| only in passing| and moves on by step/, '') };
}

function weighKey(evidence: KeyEvidence, key: number, from: number, to: number, slices: Slices, weights: Weights, add: AddTerm): void {
  const facts = new Float32Array(KEY_FACT_COUNT);
  const rivals = rivalKeys(key);
  for (let i = from; i < to; i++) {
    const beats = slices.beats[i]!;
    const own = scoreKeyAt(evidence, weights.values, i, key, facts);
    const best = Math.max(...rivals.map((rival) => scoreKeyAt(evidence, weights.values, i, rival, facts)));
    add('key-fits', 'the notes around fit the key', Math.max(0, own - best) * beats);
    add('key-doubtful', 'the notes around would fit another key as well or better', Math.min(0, own - best) * beats);
    fillKeyFacts(facts, evidence, i, key);
    KEY_FACTS.forEach(([name, sentence], k) => {
      if (facts[k] !== 0 && name.startsWith('home')) add(name, sentence, facts[k]! * weights.values[AT.key + KEY_PROFILE_COUNT + k]! * beats);
    });
  }
}

/** The keys nearest to a key: its fifths, its relative and parallel. */
function rivalKeys(key: number): readonly number[] {
  return key & 1 ? [key - 2, key + 2, key - 7, key - 1] : [key - 2, key + 2, key + 7, key + 1];
}

function weighFrequency(ground: Ground, chord: { root: number; kind: number; inversion: number; rank: number }, own: { key: number; id: number }, from: number, to: number, weights: Weights, add: AddTerm): void {
  const material = oneSpan(ground, from, to, chord);
  new NodeTerms(material, weights).readLabel(0, 0, own.key, own.id, (weight, amount) => {
    const value = weights.values[weight]! * amount;
    const term = LABEL_TERMS[weight - AT.label];
    if (term && weight >= AT.label) add(term[0], term[1], value);
    else add('label-habit', 'what analysts usually write here', value);
  });
}

/** A material of one span and one chord, for terms that are read from it. */
function oneSpan({ slices, evidence }: Ground, from: number, to: number, chord: { root: number; kind: number; inversion: number }): Material {
  const bins: number[] = [];
  const plain: number[] = [];
  const moving: number[] = [];
  for (let p = slices.first[from]!; p < slices.first[to]!; p++) {
    bins.push(slices.bin[p]!);
    plain.push(slices.channel[p] === 0 ? slices.sounding[p]! : 0);
    moving.push(slices.channel[p] === 0 ? 0 : slices.sounding[p]!);
  }
  const spanTerms = new Float32Array(SPAN_TERM_COUNT);
  const sound = new SpanSound();
  for (let i = from; i < to; i++) sound.addSlice(slices, i);
  fillSpanTerms(spanTerms, sound, slices, from, to);
  const one = (value: number) => Int32Array.of(value);
  return {
    slices,
    evidence,
    segments: { count: 1, start: one(from), end: one(to), from: Int32Array.of(0, 1) },
    candidateFrom: Int32Array.of(0, 1),
    root: Uint8Array.of(chord.root),
    kind: Uint8Array.of(chord.kind),
    inversion: Uint8Array.of(chord.inversion),
    terms: new Float32Array(CHORD_TERM_COUNT),
    spanTerms,
    soundFrom: Int32Array.of(0, bins.length),
    soundBin: Uint8Array.from(bins),
    soundPlain: Float32Array.from(plain),
    soundMoving: Float32Array.from(moving),
  };
}

function weighNeighbours({ slices, evidence }: Ground, [before, label, after]: readonly (Label | undefined)[], from: number, to: number, weights: Weights, add: AddTerm): void {
  const states = [before, label, after].map((each) => (each ? readState(each) : null));
  const transitions = new Transitions({ slices, evidence } as Material, weights);
  const pairs = [
    [states[0], states[1], from, 'coming from the chord before'],
    [states[1], states[2], to, 'going on to the next chord'],
  ] as const;
  for (const [a, b, j, where] of pairs) {
    if (!a || !b || j === 0 || j >= slices.count) continue;
    let usual = 0;
    transitions.read(a.state, b.state, j, (weight, amount) => {
      const value = weights.values[weight]! * amount;
      const term = TRANSITION_TERMS[weight - AT.transition];
      if (term && weight >= AT.transition && weight < AT.perLabel && !BOOKKEEPING.test(term[0]) && !term[0].includes('frequency')) add(term[0], term[1], value);
      else usual += value;
    });
    add(`progression ${where}`, `${where}: how usual the progression is`, usual);
  }
}

