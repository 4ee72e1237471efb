import type { NonChordKind } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import { type SheetGeometry, findHead } from './geometry';

export interface ToneMark {
  readonly noteId: number;
  readonly kind: NonChordKind;
  /** A person said so. */
  readonly byHand: boolean;
}

/** The usual short forms, common practice; a note of no known kind bears a question mark. */
const SHORT = {
  passing: 'P',
  neighbour: 'N',
  'double-neighbour': 'DN',
  appoggiatura: 'App',
  escape: 'E',
  anticipation: 'Ant',
  suspension: 'S',
  retardation: 'R',
  pedal: 'Ped',
  other: '?',
} as const satisfies Record<NonChordKind, string>;

/** The kinds of non-chord tones at their notes; those a person named upright, ours in italics. */
export function ToneMarks({ geometry, score, marks }: { readonly geometry: SheetGeometry; readonly score: Score; readonly marks: readonly ToneMark[] }) {
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 overflow-visible" width={geometry.width} height={geometry.height}>
      {marks.map(({ noteId, kind, byHand }) => {
        const note = score.notes[noteId];
        const head = note && findHead(geometry, score.notes, note, note.start);
        if (!head) return null;
        return (
          <text
            key={noteId}
            data-tone={kind}
            x={head.x + head.width / 2 + 3}
            y={head.y - 7}
            fontSize="13"
            className={byHand ? 'fill-ink font-sans font-medium' : 'fill-ink-soft font-book italic'}
            style={{ paintOrder: 'stroke', stroke: 'var(--color-sheet)', strokeWidth: 3 }}
          >
            {SHORT[kind]}
          </text>
        );
      })}
    </svg>
  );
}
