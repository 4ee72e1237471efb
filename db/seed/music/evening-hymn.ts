import type { NotatedPiece } from './notation';

/** Four-part hymn in G: applied leading-tone sevenths to V, vi and ii, a middle phrase in e minor. */
export const EVENING_HYMN: NotatedPiece = {
  title: 'Evening Hymn',
  composer: 'Understave',
  work: 'Studies for the seminar, no. 1',
  source: 'Written for the demo of Understave',
  rights: 'CC0: free for any use',
  keyFifths: 1,
  mode: 'major',
  time: [4, 4],
  tempo: 'Calm',
  parts: [
    {
      name: 'Choir or organ',
      clefs: ['G2', 'F4'],
      voices: [
        {
          staff: 1,
          bars: [
            'g4q a4q g4q g4q | a4q g4q f#4h | a4q b4q c5q b4q | g4q f#4q g4h',
            'b4e c5e d5q c5q b4q | a4e b4e c5q b4h | c5e d5e e5q d5q c5q | b4h e5q d5e c5e',
            'b4q c5q b4q b4q | c5e b4e a4q b4h | c5q b4q a4q g4q | f#4h. f#4q',
            'g4q f4q e4q g4e a4e | b4q c5q c5q b4q | e5q e5q d5q c5q | b4w',
          ].join(' | '),
        },
        {
          staff: 1,
          bars: [
            'd4q d4q d4q e4q | e4q e4q d4h | d4q d4q d#4q e4q | e4q d4q d4h',
            'd4q f4q e4q c#4q | d4q f#4q e4h | e4q g4q g4q f#4q | g4h e4q f#4q',
            'e4q e4q d#4q e4q | e4q e4q d#4h | d#4q e4q e4q e4q | d4h. d4q',
            'd4q d4q c4q eb4q | d4q f#4q f#4q g4q | g4q g4q g4q f#4q | g4w',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'b3q a3q b3q b3q | a3q b3q a3h | f#3q g3q a3q g3q | a3e b3e c4q b3h',
            'b3q b3q a3q g3q | a3q a3q g3h | g3e a3e bb3q b3q a3q | g3h a3q a3q',
            'g3q f#3q f#3q g3q | g3q a3e g3e f#3h | a3q b3q c4q a3q | a3h. a3q',
            'g3q g3q g3q g3q | g3q a3q a3q g3q | a3q bb3q b3q a3q | b3w',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'g3q f#3q g3e f#3e e3e d3e | c3q c#3q d3h | c3q b2q f#2q g2q | c3q d3q g2h',
            'g2q g#2q a2q e3q | f#3e e3e d#3q e3h | c3q c#3q d3q d3q | e3h c3q d3q',
            'e3q a2q b2q e3q | c3q c3q b2h | f#2q g2q a2q c#3q | d3h. c3q',
            'b2q b2q c3q c3q | d3q d3q d#3q e3e d3e | c3q c#3q d3q d3q | g3w',
          ].join(' | '),
        },
      ],
    },
  ],
};
