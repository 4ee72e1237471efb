import type { NotatedPiece } from './notation';

/** Minuet in c minor: ° sevenths to iv, V and III, the Neapolitan sixth and a German sixth. */
export const MINUET_IN_C_MINOR: NotatedPiece = {
  title: 'Minuet in C minor',
  composer: 'Understave',
  work: 'Studies for the seminar, no. 3',
  source: 'Written for the demo of Understave',
  rights: 'CC0: free for any use',
  keyFifths: -3,
  mode: 'minor',
  time: [3, 4],
  tempo: 'Minuet',
  parts: [
    {
      name: 'Piano',
      clefs: ['G2', 'F4'],
      voices: [
        {
          staff: 1,
          bars: [
            'c5q eb5q g5q | g5q. f5e eb5q | d5q f5q ab5q | g5h eb5q',
            'f5q ab5q c6q | c6q a5q f#5q | g5q. a5e b5q | g5h rq',
            'g5q bb5q g5q | ab5q. g5e f5q | f5q ab5q f5q | g5q. f5e eb5q',
            'ab5q f5q db5q | c5h eb5q | eb5q d5q. b4e | c5h.',
            'c5q eb5q ab5q | c6q ab5q f#5q | g5h eb5q | d5q. eb5e f5q',
            'eb5q. d5e c5q | f5q db5q c5q | c5q b4q. d5e | c5h.',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'rq [eb3 c4 g4]q [eb3 c4 g4]q | rq [eb3 c4 g4]q [eb3 c4 g4]q | rq [f3 b3 ab4]q [f3 b3 ab4]q',
            'rq [g3 c4 g4]q [g3 c4 g4]q | rq [ab3 c4 f4]q [ab3 c4 f4]q | rq [a3 c4 eb4]q [a3 c4 eb4]q',
            'rq [g3 b3 d4]q [g3 b3 d4]q | rq [g3 b3 d4]q [g3 b3 d4]q | rq [bb3 c4 g4]q [bb3 c4 g4]q',
            'rq [ab3 c4 f4]q [ab3 c4 f4]q | rq [cb4 f4 ab4]q [cb4 f4 ab4]q | rq [bb3 eb4 g4]q [bb3 eb4 g4]q',
            'rq [ab3 db4 f4]q [ab3 db4 f4]q | rq [eb3 c4 a4]q [eb3 c4 a4]q | [eb3 c4 g4]q [d3 b3 f4]q [d3 b3 f4]q',
            'rq [eb3 c4 eb4]q [eb3 c4 eb4]q | rq [eb3 c4]q [eb3 c4]q | rq [eb3 c4 f#4]q [eb3 c4 f#4]q',
            'rq [eb3 c4 g4]q [eb3 c4 g4]q | rq [d3 b3 f4]q [d3 b3 f4]q | rq [c3 c4 eb4]q [c3 c4 eb4]q',
            'rq [db3 ab3 f4]q [eb3 c4 a4]q | [eb3 c4 g4]q [d3 b3 f4]q [d3 b3 f4]q | rq [eb3 c4 eb4]q [eb3 c4 eb4]q',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'c2h. | c2h. | d2h. | eb2h. | f2h. | f#2h.',
            'g2h. | g2h. | e2h. | f2h. | d2h. | eb2h.',
            'f2h. | f#2h. | g2q g2h | c3h. | ab2h. | ab2h.',
            'g2h. | g2h. | ab2h. | f2h f#2q | g2q g2h | c3h.',
          ].join(' | '),
        },
      ],
    },
  ],
};
