import { BACH_PRELUDE_IN_C } from './bach-prelude-in-c';
import { EVENING_HYMN } from './evening-hymn';
import { MINUET_IN_C_MINOR } from './minuet-in-c-minor';
import type { NotatedPiece } from './notation';
import { ROMANCE_FOR_CLARINET } from './romance-for-clarinet';
import { SONG_WITHOUT_WORDS } from './song-without-words';
import { STAIRCASE } from './staircase';

export { engravePiece } from './engrave';
export type { NotatedPiece } from './notation';

/** The demo's library: five pieces of our own and one in the public domain. */
export const DEMO_PIECES = {
  eveningHymn: EVENING_HYMN,
  staircase: STAIRCASE,
  minuet: MINUET_IN_C_MINOR,
  song: SONG_WITHOUT_WORDS,
  romance: ROMANCE_FOR_CLARINET,
  prelude: BACH_PRELUDE_IN_C,
} as const satisfies Readonly<Record<string, NotatedPiece>>;
export type DemoPieceName = keyof typeof DEMO_PIECES;
