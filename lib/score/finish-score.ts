import { midiOf } from '../theory/pitch';
import { layOutBars } from './bars';
import type { Draft, WrittenKey } from './draft';
import { type PlacedNote, mergeTies } from './ties';
import type { ScoreHead } from './read-score';
import { refuse } from './refusal';
import { type Bar, type GraceNote, type KeySignature, type Note, type Part, type Score, type TimeSignature, ticks } from './score';

/** Draft → Score: bars laid end to end, ties merged, everything sorted and numbered. */
export function finishScore(draft: Draft, head: ScoreHead): Score {
  if (head.parts.length === 0) refuse('score_empty', 'The file holds no parts. Export the score again.', { element: 'part' });
  if (draft.bars.length === 0) refuse('score_empty', 'The file’s parts hold no bars. Export the score again.', { element: 'measure' });
  const bars = layOutBars(draft);
  const { notes, idOfWritten } = numberNotes(mergeTies(draft, bars));
  return {
    title: head.movement || head.work || creditOf(head, 'title'),
    work: head.work !== head.movement && head.movement ? head.work : '',
    composer: head.composer || creditOf(head, 'composer'),
    ticksPerQuarter: draft.ticksPerQuarter,
    parts: partsOf(head),
    bars,
    notes,
    graceNotes: graceNotesOf(draft, bars, idOfWritten),
    keySignatures: keySignaturesOf(draft, bars),
    timeSignatures: timeSignaturesOf(draft, bars),
    playOrder: draft.playOrder,
    warnings: draft.warnings,
  };
}

function partsOf(head: ScoreHead): Part[] {
  return head.parts.map(({ index, id, staves }) => ({ index, id, name: head.partNames.get(id) ?? '', staves }));
}

function creditOf(head: ScoreHead, type: string): string {
  const credit = head.credits.find(({ children }) => children.some(({ name, text }) => name === 'credit-type' && text.trim() === type));
  return (credit?.children ?? []).filter(({ name }) => name === 'credit-words').map(({ text }) => text.trim()).join(' ');
}

/** Sorts notes and gives them their ids; `idOfWritten` leads from each written note to the sounding note it became part of. */
function numberNotes(placed: PlacedNote[]): { notes: Note[]; idOfWritten: Map<number, number> } {
  placed.sort((a, b) => a.start - b.start || a.part - b.part || a.staff - b.staff || midiOf(a.pitch) - midiOf(b.pitch) || (a.written[0] ?? 0) - (b.written[0] ?? 0));
  const idOfWritten = new Map<number, number>();
  const notes = placed.map(({ written, start, duration, attacks, pitch, part, staff, voice }, id): Note => {
    for (const index of written) idOfWritten.set(index, id);
    return { id, pitch, start: ticks(start), duration: ticks(duration), part, staff, voice, attacks: attacks.map(ticks) };
  });
  return { notes, idOfWritten };
}

function graceNotesOf(draft: Draft, bars: readonly Bar[], idOfWritten: ReadonlyMap<number, number>): GraceNote[] {
  return draft.graces
    .map(({ bar, at, pitch, mainNote }) => ({
      pitch,
      mainNote: mainNote === null ? null : (idOfWritten.get(mainNote) ?? null),
      start: ticks((bars[bar] as Bar).start + at),
    }))
    .sort((a, b) => a.start - b.start);
}

/** The keys of the first part that has pitched notes and a key (percussion parts often carry an idle one). */
function keySignaturesOf(draft: Draft, bars: readonly Bar[]): KeySignature[] {
  const pitched = new Set(draft.notes.map(({ part }) => part));
  const part = Math.min(...draft.keys.filter((key) => pitched.has(key.part)).map((key) => key.part));
  const first = Number.isFinite(part) ? part : (draft.keys[0]?.part ?? 0);
  const keys = draft.keys.filter((key) => key.part === first && key.staff <= 1).map((key) => placeKey(key, bars));
  return keys.filter((key, i) => i === 0 || key.fifths !== keys[i - 1]?.fifths || key.mode !== keys[i - 1]?.mode);
}

function placeKey({ bar, at, fifths, mode }: WrittenKey, bars: readonly Bar[]): KeySignature {
  return { start: ticks((bars[bar] as Bar).start + at), fifths, mode };
}

function timeSignaturesOf(draft: Draft, bars: readonly Bar[]): TimeSignature[] {
  const first = draft.times[0]?.part;
  return draft.times.flatMap(({ part, bar, at, metre }) =>
    part === first && metre ? [{ ...metre, start: ticks((bars[bar] as Bar).start + at) }] : [],
  );
}
