/**
 * Our own drawings of the accidentals, made to stand beside Alegreya's capitals and figures, which has none: hairline
 * stems and broad bars, 1000 units to the em, y upwards from the baseline. lib/cli/draw-signs.ts makes the font of them;
 * whoever prints without that font fills these outlines (non-zero winding).
 */
export interface SignOutline {
  readonly advance: number;
  /** Absolute M, L, C and Z commands of an SVG path. */
  readonly path: string;
}

const FLAT = flatAt(0);

export const SIGN_OUTLINES: Readonly<Record<'♭' | '♯' | '♮' | '𝄪' | '𝄫', SignOutline>> = {
  '♭': { advance: 350, path: FLAT },
  '♯': {
    advance: 430,
    path: [
      'M125 -85 L125 633 L164 651 L164 -67 Z',
      'M265 -13 L265 705 L304 723 L304 5 Z',
      'M52 126 L52 214 L378 300 L378 212 Z',
      'M52 376 L52 464 L378 550 L378 462 Z',
    ].join(' '),
  },
  '♮': {
    advance: 350,
    path: [
      'M70 100 L70 716 L109 716 L109 109 Z',
      'M241 -78 L241 529 L280 538 L280 -78 Z',
      'M70 100 L70 188 L280 240 L280 152 Z',
      'M70 398 L70 486 L280 538 L280 450 Z',
    ].join(' '),
  },
  '𝄪': {
    advance: 440,
    path: [
      'M60 92 L60 196 L130 196 C172 196 190 240 220 276 C250 240 268 196 310 196 L380 196 L380 92 L276 92 L276 150 C276 190 246 214 220 236 C194 214 164 190 164 150 L164 92 Z',
      'M60 460 L164 460 L164 402 C164 362 194 338 220 316 C246 338 276 362 276 402 L276 460 L380 460 L380 356 L310 356 C268 356 250 312 220 276 C190 312 172 356 130 356 L60 356 Z',
      'M176 276 L220 328 L264 276 L220 224 Z',
    ].join(' '),
  },
  '𝄫': { advance: 600, path: `${FLAT} ${flatAt(256)}` },
};

/** A flat with its stem at `x` units from its usual place: outside clockwise, the eye of the bowl against it. */
function flatAt(x: number): string {
  const outside = [[56, -30], [56, 738], [98, 738], [93, 372], [124, 404, 170, 424, 212, 424], [272, 424, 314, 384, 314, 318], [314, 206, 186, 92, 58, -30]];
  const eye = [[94, 66], [166, 130, 232, 214, 232, 298], [232, 348, 206, 374, 172, 374], [140, 374, 112, 352, 91, 318]];
  return `${contour(outside, x)} ${contour(eye, x)}`;
}

function contour(points: readonly (readonly number[])[], dx: number): string {
  const moved = points.map((point) => point.map((value, i) => (i % 2 === 0 ? value + dx : value)).join(' '));
  return `${moved.map((at, i) => `${i === 0 ? 'M' : (points[i]?.length ?? 0) > 2 ? 'C' : 'L'}${at}`).join(' ')} Z`;
}
