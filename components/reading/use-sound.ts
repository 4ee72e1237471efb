'use client';

import { type Dispatch, useState } from 'react';
import { namePlace } from '@/components/score/beats';
import { type PlayList, type StaffId, playChord, playReduction, playScore } from '@/components/sound/play-list';
import type { PlayPlace } from '@/components/sound/play-place';
import { usePlayer } from '@/components/sound/use-player';
import type { Score } from '@/lib/score/score';
import { type DeskAction, type DeskState, findSelection, getSelected } from './desk-state';

/** What the desk can play: the music from the label on, the music of the selection, the label's chord, the labels as chords. */
export const PLAYED = ['from-here', 'span', 'chord', 'reduction'] as const;
export type Played = (typeof PLAYED)[number];

export interface Sound {
  readonly playing: boolean;
  readonly place: PlayPlace;
  readonly shown: boolean;
  show(shown: boolean): void;
  readonly tempo: number;
  setTempo(tempo: number): void;
  readonly loop: boolean;
  setLoop(loop: boolean): void;
  readonly muted: ReadonlySet<StaffId>;
  mute(staff: StaffId, muted: boolean): void;
  play(what: Played): void;
  stop(): void;
}

const START_TEMPO = 72;

/** The desk's sound. Everything begins with a key or a press; nothing plays by itself. */
export function useSound(score: Score, state: DeskState, dispatch: Dispatch<DeskAction>): Sound {
  const [shown, show] = useState(false);
  const [tempo, setTempo] = useState(START_TEMPO);
  const [loop, setLoop] = useState(false);
  const [muted, setMuted] = useState<ReadonlySet<StaffId>>(new Set());
  const { playing, place, play, stop } = usePlayer({ tempo, loop, muted });

  const begin = async (list: PlayList, words: string) => {
    show(true);
    dispatch({ kind: 'say', text: words });
    const trouble = await play(list);
    if (trouble) dispatch({ kind: 'say', text: trouble });
  };
  return {
    playing,
    place,
    shown,
    show,
    tempo,
    setTempo,
    loop,
    setLoop,
    muted,
    mute: (staff, isMuted) => setMuted((all) => new Set([...all].filter((other) => other !== staff).concat(isMuted ? [staff] : []))),
    play: (what) => {
      const asked = listFor(what, score, state);
      if (asked) void begin(asked.list, asked.words);
      else dispatch({ kind: 'say', text: 'A blank has no chord to play.' });
    },
    stop,
  };
}

function listFor(what: Played, score: Score, state: DeskState): { list: PlayList; words: string } | null {
  const label = getSelected(state);
  const chosen = findSelection(state);
  const first = chosen[0] ?? label;
  const last = chosen.at(-1) ?? label;
  const { labels, end } = state.reading;
  const from = `from ${namePlace(score, first.start)}`;
  if (what === 'span') return { list: playScore(score, { start: first.start, end: last.end }), words: 'Playing the selection.' };
  if (what === 'from-here') return { list: playScore(score, { start: first.start, end }), words: `Playing ${from}.` };
  if (what === 'reduction') {
    const passage = { start: first.start, end: chosen.length > 1 ? last.end : end };
    return { list: playReduction(score, labels, passage), words: `Playing the chords ${from}.` };
  }
  return label.numeral && { list: playChord(label.key, label.numeral), words: 'Playing the chord.' };
}
