/** Bass motion between two chords by the distance of the bass tones on the line of fifths. */
export const BASS_MOTIONS = [
  'no step', 'fifth up', 'fifth down', 'whole step up', 'whole step down', 'half step up', 'half step down',
  'major third up', 'major third down', 'minor third up', 'minor third down', 'tritone', 'another interval',
] as const;

const BY_FIFTHS: Readonly<Record<number, number>> = {
  0: 0, 1: 1, [-1]: 2, 2: 3, [-2]: 4, [-5]: 5, 5: 6, 4: 7, [-4]: 8, [-3]: 9, 3: 10, 6: 11, [-6]: 11,
};

const LOOKUP = Uint8Array.from({ length: 128 }, (_, i) => BY_FIFTHS[i - 64] ?? 12);

/** The motion's number from the difference (to − from) of two bass tones in fifths. */
export function bassMotionOf(difference: number): number {
  return LOOKUP[difference + 64] ?? 12;
}
