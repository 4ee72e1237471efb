import { type Search, addLogs } from './decode';

/**
 * Probability of every node, transition and whole under the model: exp(sum of a path's terms), summed over all paths
 * through it, over the sum of all paths.
 */
export interface Posterior {
  readonly node: Float64Array;
  /** Calls `visit` with each transition's departure, arrival and probability, where it is above `least`. */
  eachTransition(least: number, visit: (departure: number, arrival: number, probability: number) => void): void;
}

export function sumBackward(found: Search, bonus?: Float64Array): Posterior {
  const { lattice, edges, arrivalSum, departureSum, total } = found;
  const arrivalRest = new Float64Array(arrivalSum.length).fill(-Infinity);
  const departureRest = new Float64Array(departureSum.length).fill(-Infinity);
  const end = lattice.boundaries;
  for (let a = lattice.arrivalFrom[end]!; a < lattice.arrivalFrom[end + 1]!; a++) arrivalRest[a] = 0;
  let n = lattice.count - 1;
  for (let j = end - 1; j >= 0; j--) {
    const first = lattice.departureFrom[j]!;
    for (; n >= 0 && lattice.departureOf[n]! >= first; n--) {
      const d = lattice.departureOf[n]!;
      const rest = arrivalRest[lattice.arrivalOf[n]!]!;
      if (rest === -Infinity) continue;
      departureRest[d] = addLogs(departureRest[d]!, rest + lattice.score[n]! + (bonus ? bonus[n]! : 0));
    }
    passEdges(found, arrivalRest, departureRest, first, lattice.departureFrom[j + 1]!);
  }
  const node = new Float64Array(lattice.count);
  for (let i = 0; i < lattice.count; i++) {
    const sum = departureSum[lattice.departureOf[i]!]! + lattice.score[i]! + (bonus ? bonus[i]! : 0) + arrivalRest[lattice.arrivalOf[i]!]!;
    node[i] = sum > total - 40 ? Math.exp(sum - total) : 0;
  }
  return {
    node,
    eachTransition(least, visit) {
      const floor = total + Math.log(least);
      for (let d = 0; d < departureRest.length; d++) {
        if (departureRest[d] === -Infinity) continue;
        for (let x = edges.edgeFrom[d]!; x < edges.edgeFrom[d + 1]!; x++) {
          const sum = arrivalSum[edges.arrival[x]!]! + edges.score[x]! + departureRest[d]!;
          if (sum > floor) visit(d, edges.arrival[x]!, Math.exp(sum - total));
        }
      }
    },
  };
}

/** Adds what follows each departure to the arrivals before it, once per arrival in linear space around the highest. */
function passEdges(found: Search, arrivalRest: Float64Array, departureRest: Float64Array, first: number, last: number): void {
  const { edges, arrivalSum, total } = found;
  for (let d = first; d < last; d++) {
    const rest = departureRest[d]!;
    if (rest === -Infinity) continue;
    for (let x = edges.edgeFrom[d]!; x < edges.edgeFrom[d + 1]!; x++) {
      const a = edges.arrival[x]!;
      const sum = edges.score[x]! + rest;
      if (arrivalSum[a]! + sum < total - 25) continue;
      arrivalRest[a] = addLogs(arrivalRest[a]!, sum);
    }
  }
}
