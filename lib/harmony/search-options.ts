import { type SearchOptions } from './decode';
import { type LatticeOptions } from './lattice';

/**
 * How much of the lattice is kept; see the types for the units. Half of it costs half the time and, on held-out folds, a
 * tenth of a percent of the numerals.
 */
export const LATTICE_OPTIONS: LatticeOptions = { nodesPerSegment: 16, nodeMargin: 6, chordsPerSegment: 5 };

export const SEARCH_OPTIONS: SearchOptions = { beam: 32, beamMargin: 9, otherKeys: 8 };

/** Learning sees more: what the weights of today would prune may be right tomorrow. */
export const LEARNING_LATTICE: LatticeOptions = { nodesPerSegment: 24, nodeMargin: 8, chordsPerSegment: 6 };

export const LEARNING_SEARCH: SearchOptions = { beam: 48, beamMargin: 10, otherKeys: 10 };
