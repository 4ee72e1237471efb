import { type SearchOptions } from './decode';
import { type LatticeOptions } from './lattice';

/** How much of the lattice is kept; see the types for the units. */
export const LATTICE_OPTIONS: LatticeOptions = { nodesPerSegment: 40, nodeMargin: 9, chordsPerSegment: 7 };

export const SEARCH_OPTIONS: SearchOptions = { beam: 80, beamMargin: 14, otherKeys: 14 };
