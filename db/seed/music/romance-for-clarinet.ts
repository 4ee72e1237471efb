import type { NotatedPiece } from './notation';

/** Romance in f minor with a clarinet in B flat (written a major second higher) and a middle section in A flat. */
export const ROMANCE_FOR_CLARINET: NotatedPiece = {
  title: 'Romance for clarinet',
  composer: 'Understave',
  work: 'Studies for the seminar, no. 5',
  source: 'Written for the demo of Understave',
  rights: 'CC0: free for any use',
  keyFifths: -4,
  mode: 'minor',
  time: [6, 8],
  tempo: 'Andantino',
  parts: [
    {
      name: 'Clarinet in B flat',
      clefs: ['G2'],
      transpose: { diatonic: -1, chromatic: -2 },
      voices: [
        {
          staff: 1,
          bars: [
            'c5q db5e c5q. | bb4q c5e db5q. | db5q c5e bb4q g4e | ab4q. c5q f5e',
            'eb5q. gb5q eb5e | f5q eb5e db5q. | d5q. f5q d5e | e5q. c5q.',
            'db5q. bb4q db5e | c5q bb4e ab4q. | bb4q. db5q g4e | ab4q. c5q.',
            'f5q. eb5q db5e | c5h. | db5q c5e bb4q. | c5q. e5q.',
            'db5q. gb5q. | f5q. e5q d5e | f5q. c5q ab4e | f4h.',
          ].join(' | '),
        },
      ],
    },
    {
      name: 'Piano',
      clefs: ['G2', 'F4'],
      voices: [
        {
          staff: 1,
          bars: [
            're [c4 f4]e [f4 ab4]e re [c4 f4]e [f4 ab4]e | re [bb3 f4]e [f4]e re [bb3 f4]e [f4]e',
            're [db4 e4]e [e4 g4]e re [db4 e4]e [e4 g4]e | re [c4 f4]e [f4 ab4]e re [c4 f4]e [f4 ab4]e',
            're [c4 eb4]e [eb4 gb4]e re [c4 eb4]e [eb4 gb4]e | re [bb3 db4]e [db4 f4]e re [bb3 db4]e [db4 f4]e',
            're [ab3 d4]e [d4 f4]e re [ab3 d4]e [d4 f4]e | re [g3 c4]e [c4 e4]e re [g3 c4]e [c4 e4]e',
            're [bb3 db4]e [db4 fb4]e re [bb3 db4]e [db4 fb4]e | re [ab3 c4]e [c4 eb4]e re [ab3 c4]e [c4 eb4]e',
            're [bb3 db4]e [db4 g4]e re [bb3 db4]e [db4 g4]e | re [ab3 c4]e [c4 f4]e re [ab3 c4]e [c4 f4]e',
            're [f3 bb3]e [bb3 ab4]e re [eb3 db4]e [db4 g4]e | re [eb3 c4]e [c4 ab4]e re [eb3 c4]e [c4 ab4]e',
            're [g3 db4]e [db4 f4]e re [g3 db4]e [db4 f4]e | re [g3 c4]e [c4 e4]e re [g3 c4]e [c4 e4]e',
            're [gb3 db4]e [db4]e re [gb3 db4]e [db4]e | re [ab3 c4]e [c4 f4]e re [bb3 c4]e [c4 e4]e',
            're [ab3 c4]e [c4 f4]e re [ab3 c4]e [c4 f4]e | re [ab3 c4]e [c4 ab4]e re [ab3 c4]e [c4 ab4]e',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'f3h. | db3h. | bb2h. | ab2h. | a2h. | bb2h.',
            'b2h. | c3h. | g2h. | ab2h. | e2h. | f2h.',
            'db2q. eb2q. | ab2h. | bb2h. | c3h. | bb2h. | c3q. c3q.',
            'f3h. | f3h.',
          ].join(' | '),
        },
      ],
    },
  ],
};
