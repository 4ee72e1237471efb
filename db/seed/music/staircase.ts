import type { NotatedPiece } from './notation';

/** String quartet in D: applied °7 chords climb from ii to vi, each to its own target. */
export const STAIRCASE: NotatedPiece = {
  title: 'Staircase',
  composer: 'Understave',
  work: 'Studies for the seminar, no. 2',
  source: 'Written for the demo of Understave',
  rights: 'CC0: free for any use',
  keyFifths: 2,
  mode: 'major',
  time: [3, 4],
  tempo: 'Flowing',
  parts: [
    {
      name: 'Violin I',
      clefs: ['G2'],
      voices: [
        {
          staff: 1,
          bars: [
            'd5h e5q | d5q c5h | b4h b4q | a4h.',
            'eb5h d5q | d5h e5q | c#5h b4q | b4q b4h',
            'a4h g4q | f#4h a4q | g4h bb4q | a4q g4h',
            'f#4h.',
          ].join(' | '),
        },
      ],
    },
    {
      name: 'Violin II',
      clefs: ['G2'],
      voices: [
        {
          staff: 1,
          bars: [
            'a4h a4q | a4q a4h | g4h g#4q | a4h.',
            'a4h g4q | f#4h e4q | e4h d4q | d4q d4h',
            'd4h c#4q | d4h c4q | b3h d4q | d4q c#4h',
            'd4h.',
          ].join(' | '),
        },
      ],
    },
    {
      name: 'Viola',
      clefs: ['C3'],
      voices: [
        {
          staff: 1,
          bars: [
            'f#4h e4q | f#4q f#4h | e4h d4q | c#4h.',
            'c4h b3q | g#3h a3q | g3h f#3q | g3q f3h',
            'f#3h e3q | d3h d3q | d3h d3q | f#3q e3h',
            'f#3h.',
          ].join(' | '),
        },
      ],
    },
    {
      name: 'Violoncello',
      clefs: ['F4'],
      voices: [
        {
          staff: 1,
          bars: [
            'd3h c#3q | d3q d#3h | e3h e#3q | f#3h.',
            'f#3h g3q | b2h c#3q | a#2h b2q | g2q g#2h',
            'a2h a2q | b2h f#2q | g2h g2q | a2q a2h',
            'd3h.',
          ].join(' | '),
        },
      ],
    },
  ],
};
