import { type SearchOptions } from './decode';
import { type LatticeOptions } from './lattice';

/** How much of the lattice is kept; see the types for the units. */
export const LATTICE_OPTIONS: LatticeOptions = { nodesPerSegment: 24, nodeMargin: 7, chordsPerSegment: 6 };

export const SEARCH_OPTIONS: SearchOptions = { beam: 48, beamMargin: 10, otherKeys: 10 };
