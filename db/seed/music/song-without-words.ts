import type { NotatedPiece } from './notation';

/** Song without words in E flat: ° sevenths to ii, vi and V, a common-tone ° seventh and the minor subdominant. */
export const SONG_WITHOUT_WORDS: NotatedPiece = {
  title: 'Song without words',
  composer: 'Understave',
  work: 'Studies for the seminar, no. 4',
  source: 'Written for the demo of Understave',
  rights: 'CC0: free for any use',
  keyFifths: -3,
  mode: 'major',
  time: [4, 4],
  tempo: 'Singing',
  parts: [
    {
      name: 'Piano',
      clefs: ['G2', 'F4'],
      voices: [
        {
          staff: 1,
          bars: [
            'g4q. ab4e bb4q eb5q | eb5q. bb4e db5q. bb4e | c5q. bb4e ab4q c5q',
            'd5q. c5e bb4h | bb4q. eb5e d5q f5q | eb5q. d5e c5q eb5q',
            'd5q. c5e bb4q d5q | eb5h. bb4q | c5q. eb5e cb5q. ab4e',
            'bb4h a4q c5q | bb4h. eb5q | eb5q. c5e eb5q g5q',
            'f5q. eb5e d5q bb4q | c5q eb5q db5q. bb4e | c5q f5q eb5q c5q',
            'bb4q eb5q d5q. f5e | eb5h ab4q cb5q | bb4q g4q eb4h',
          ].join(' | '),
        },
        {
          staff: 2,
          bars: [
            'eb3e bb3e eb4e g4e eb3e bb3e eb4e g4e | g3e bb3e eb4e eb4e e3e bb3e db4e g4e',
            'f3e ab3e c4e f4e f3e ab3e c4e f4e | bb2e bb3e d4e ab4e eb3e bb3e eb4e g4e',
            'eb3e bb3e eb4e g4e b2e ab3e d4e f4e | c3e g3e c4e eb4e a2e g3e c4e eb4e',
            'bb2e f3e bb3e d4e ab2e d3e bb3e f4e | g2e eb3e bb3e g4e g2e eb3e bb3e g4e',
            'ab2e eb3e c4e eb4e ab2e eb3e cb4e eb4e | eb2e eb3e bb3e g4e eb2e c3e a3e f#4e',
            'eb2e eb3e bb3e g4e eb2e eb3e bb3e g4e | a2e gb3e c4e eb4e bb2e bb3e eb4e g4e',
            'bb2e ab3e d4e f4e bb2e ab3e d4e f4e | c3e g3e eb4e eb4e e2e bb3e db4e g4e',
            'f2e ab3e c4e f4e a2e gb3e c4e eb4e | bb2e bb3e eb4e g4e bb2e bb3e d4e ab4e',
            'eb3e bb3e eb4e g4e eb3e cb4e eb4e ab4e | eb3e bb3e eb4e g4e eb3e bb3e eb4e g4e',
          ].join(' | '),
        },
      ],
    },
  ],
};
