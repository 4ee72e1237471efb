import type { TendencyTone } from '@/lib/harmony/reading';
import type { Note, Score } from '@/lib/score/score';
import { type NoteHead, type SheetGeometry, findHead } from './geometry';

interface ResolutionArrowsProps {
  readonly geometry: SheetGeometry;
  readonly score: Score;
  readonly tones: readonly TendencyTone[];
}

/** From each tendency tone to where it goes; one that goes nowhere bears a cross. Lies over the notes. */
export function ResolutionArrows({ geometry, score, tones }: ResolutionArrowsProps) {
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 overflow-visible" width={geometry.width} height={geometry.height}>
      <defs>
        <marker id="arrow-end" viewBox="0 0 8 8" refX="7" refY="4" markerWidth="6" markerHeight="6" orient="auto-start-reverse">
          <path d="M0 .6L7.5 4 0 7.4z" className="fill-current" stroke="none" />
        </marker>
      </defs>
      {tones.map((tone) => <Resolution key={tone.noteId} geometry={geometry} score={score} tone={tone} />)}
    </svg>
  );
}

function Resolution({ geometry, score, tone }: { readonly geometry: SheetGeometry; readonly score: Score; readonly tone: TendencyTone }) {
  const from = headOf(geometry, score, tone.noteId, 'last');
  if (!from) return null;
  const to = tone.wentNoteId === null ? null : headOf(geometry, score, tone.wentNoteId, 'first');
  const regular = tone.resolution === 'as-expected' || tone.resolution === 'delayed' || tone.resolution === 'in-another-voice';
  const colour = regular ? 'text-verdigris' : 'text-madder';
  if (!to || tone.resolution === 'unresolved') return <Cross head={from} />;
  return (
    <g className={colour} fill="none" stroke="currentColor" strokeWidth="1.6" strokeDasharray={regular ? undefined : '4 3'}>
      <path d={curve(geometry, from, to)} markerEnd="url(#arrow-end)" />
      <circle cx={from.x} cy={from.y} r="9" strokeWidth="1.2" />
    </g>
  );
}

function Cross({ head }: { readonly head: NoteHead }) {
  const { x, y } = head;
  return (
    <g className="text-madder" stroke="currentColor" fill="none" strokeWidth="1.6">
      <circle cx={x} cy={y} r="9" strokeWidth="1.2" />
      <path d={`M${x + 11} ${y - 12}l7 7m0-7l-7 7`} />
    </g>
  );
}

/** A tied note is left at its last written note and reached at its first. */
function headOf(geometry: SheetGeometry, score: Score, noteId: number, which: 'first' | 'last'): NoteHead | null {
  const note: Note | undefined = score.notes[noteId]?.id === noteId ? score.notes[noteId] : score.notes.find((n) => n.id === noteId);
  const tick = which === 'first' ? note?.attacks[0] : note?.attacks.at(-1);
  return note && tick !== undefined ? findHead(geometry, score.notes, note, tick) : null;
}

/** A shallow bow above the notes; into the margin of the system when the goal stands on the next one. */
function curve(geometry: SheetGeometry, from: NoteHead, to: NoteHead): string {
  const x0 = from.x + 8;
  if (from.system !== to.system) {
    const right = geometry.systems[from.system]?.right ?? x0 + 40;
    return `M${x0} ${from.y - 6}Q${(x0 + right) / 2} ${from.y - 26} ${right} ${from.y - 8}`;
  }
  const x1 = to.x - 8;
  const lift = Math.min(30, 10 + Math.abs(x1 - x0) / 8);
  return `M${x0} ${from.y - 6}Q${(x0 + x1) / 2} ${Math.min(from.y, to.y) - lift} ${x1} ${to.y - 6}`;
}
