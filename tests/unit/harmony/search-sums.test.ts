import { describe, expect, it } from 'vitest';
import { search } from '@/lib/harmony/decode';
import { scoreKeys } from '@/lib/harmony/keys-tried';
import { buildLattice, keyOfState } from '@/lib/harmony/lattice';
import { sumBackward } from '@/lib/harmony/posterior';
import { prepare } from '@/lib/harmony/prepare';
import { LATTICE_OPTIONS, SEARCH_OPTIONS } from '@/lib/harmony/search-options';
import { getShippedWeights } from '@/lib/harmony/shipped-weights';
import { Transitions } from '@/lib/harmony/transitions';
import { LABEL_COUNT } from '@/lib/harmony/vocabulary';
import { scoreFrom } from '../../support/notation';

const { weights, choosing } = getShippedWeights();
const score = scoreFrom('C: c3 e4 g4 c5 | d3 f4 a4 d5 | f#3 c4 a4 eb5 | g3 b3 g4 d5 | g3 c4 g4 e5 | g3 b3 f4 d5 | c3 c4 e4 c5 *2');
const { material, keys, keyCount } = prepare(score, choosing);
const lattice = buildLattice(material, scoreKeys(material.slices, material.evidence, weights, keys, keyCount), weights, LATTICE_OPTIONS);
const transitions = new Transitions(material, weights);
const found = search(lattice, transitions, SEARCH_OPTIONS);

/** The invariants that the search rests on: what is quick must be what is said. */
describe('search', () => {
  it('sums transitions quickly to what their terms say', () => {
    for (let j = 1; j < lattice.boundaries; j++) {
      const from = lattice.arrivalState[lattice.arrivalFrom[j]!]!;
      for (let d = lattice.departureFrom[j]!; d < lattice.departureFrom[j + 1]!; d++) {
        const to = lattice.departureState[d]!;
        const [a, b] = [keyOfState(from), keyOfState(to)];
        if (from === to) continue;
        const chords = LABEL_COUNT * 4;
        const quick = a === b ? transitions.scoreInKey(from, to, from - a * chords, to - b * chords, j) : transitions.scoreChange(from, to, a, b, j);
        expect(quick).toBeCloseTo(transitions.score(from, to, j), 9);
      }
    }
  });

  it('gives the nodes over every slice probabilities that sum to one', () => {
    const { node } = sumBackward(found);
    for (let i = 0; i < lattice.boundaries; i++) {
      let sum = 0;
      for (let n = 0; n < lattice.count; n++) {
        const s = lattice.segment[n]!;
        if (material.segments.start[s]! <= i && i < material.segments.end[s]!) sum += node[n]!;
      }
      expect(sum).toBeCloseTo(1, 2);
    }
  });

  it('finds a best path that tiles the slices and costs what it says', () => {
    let at = 0;
    let cost = 0;
    found.best.forEach((n, i) => {
      const s = lattice.segment[n]!;
      expect(material.segments.start[s]).toBe(at);
      at = material.segments.end[s]!;
      cost += lattice.score[n]!;
      if (i > 0) cost += transitions.score(lattice.state[found.best[i - 1]!]!, lattice.state[n]!, material.segments.start[s]!);
    });
    expect(at).toBe(lattice.boundaries);
    expect(cost).toBeCloseTo(found.bestScore, 6);
    expect(found.bestScore).toBeLessThanOrEqual(found.total + 1e-9);
  });
});
