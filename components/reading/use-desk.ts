'use client';

import { type Dispatch, useCallback, useMemo, useReducer, useRef, useState } from 'react';
import type { SheetGeometry } from '@/components/score/geometry';
import { findBarAt, placeTick } from '@/components/score/geometry';
import { onsetsOf } from '@/components/score/beats';
import type { LabelPattern } from '@/lib/harmony/edit-pattern';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { DeskContext } from './commands';
import { type DeskAction, type DeskState, getSelected, openDesk, reduceDesk } from './desk-state';
import { type DeskProps, type Powers, isGiven, powersOf } from './desk-types';
import { type KeyBindings, bindKeys, keepOwnKeys, readOwnKeys } from './key-bindings';
import { type Beside, useBeside } from './use-beside';
import { type Sound, useSound } from './use-sound';

/** What is open beside or over the score. */
export type Opened = { readonly kind: 'none' } | { readonly kind: 'write'; readonly typed: string | null } | { readonly kind: 'split' | 'key' | 'help' | 'accept-from' };

export interface Desk {
  readonly context: DeskContext;
  readonly opened: Opened;
  open(opened: Opened): void;
  readonly zoom: number;
  readonly arrows: boolean;
  readonly sound: Sound;
  readonly keys: KeyBindings;
  /** Sets the keys of a command; null gives it its own again. */
  setKeys(commandId: string, keys: readonly string[] | null): void;
  readonly beside: Beside | null;
  readonly page: string;
  setPage(page: string): void;
  readonly remarkTurn: number;
  readonly marginOpen: boolean;
  setMarginOpen(open: boolean): void;
  isGiven(label: Label): boolean;
  /** Brings a label into view as soon as its sheet is drawn, and gives it the keyboard if wanted. */
  await(label: Label, keyboard: boolean): void;
  /** Some sheet is drawn: what is not needed for that may be fetched now. */
  readonly drawn: boolean;
  /** A sheet was drawn: what stands above and below what is read off it. */
  noteGeometry(geometry: SheetGeometry): void;
}

/** A label that is to be seen, on a sheet that is not drawn yet. */
interface Awaited {
  readonly label: Label;
  readonly keyboard: boolean;
}

export const ZOOMS = [0.5, 0.6, 0.7, 0.8, 0.9, 1, 1.15, 1.3, 1.5, 1.75, 2] as const;

/** The desk's state and everything its commands need. */
export function useDesk(props: DeskProps, score: Score, startZoom: number, state: DeskState, dispatch: Dispatch<DeskAction>): Desk {
  const { mode, rules, reading } = props;
  const [opened, open] = useState<Opened>({ kind: 'none' });
  const [zoom, setZoom] = useState(startZoom);
  const [arrows, setArrows] = useState(true);
  const [page, setPage] = useState(firstPage(props));
  const [remarkTurn, setRemarkTurn] = useState(0);
  const [marginOpen, setMarginOpen] = useState(props.openPage !== undefined);
  const [ownKeys, setOwnKeys] = useState(() => readOwnKeys(localStorage, props.userId));
  const keys = useMemo(() => bindKeys(ownKeys), [ownKeys]);
  const setKeys = (commandId: string, set: readonly string[] | null) => {
    const { [commandId]: _, ...others } = ownKeys;
    const next = set ? { ...others, [commandId]: set } : others;
    setOwnKeys(next);
    keepOwnKeys(localStorage, props.userId, next);
  };
  const [pattern, keepPattern] = useState<LabelPattern | null>(null);
  const sound = useSound(score, state, dispatch);
  // At first the label the desk opens on; at the beginning there is nothing to bring into view.
  const awaited = useRef<Awaited | null>(props.openAt === undefined && !props.openBar ? null : { label: getSelected(state), keyboard: false });
  const [drawn, setDrawn] = useState(false);
  const geometries = useRef(new Map<number, SheetGeometry>());
  const powers = useMemo(() => powersOf(mode, rules, props.beside !== undefined), [mode, rules, props.beside]);
  const beside = useBeside(props.beside, state, dispatch);
  const onsets = useMemo(() => onsetsOf(score, reading.start, reading.end), [score, reading.start, reading.end]);
  const given = useCallback((label: Label) => isGiven(label, rules), [rules]);
  const awaitLabel = useCallback((label: Label, keyboard: boolean) => {
    awaited.current = { label, keyboard };
  }, []);
  const noteGeometry = useCallback((geometry: SheetGeometry) => {
    const first = geometry.bars[0];
    if (first) geometries.current.set(first.bar, geometry);
    setDrawn(true);
    const { label, keyboard } = awaited.current ?? {};
    const element = label && findBarAt(geometry, label.start) ? document.querySelector<HTMLElement>(`[data-label="${label.id}"]`) : null;
    if (!element) return;
    awaited.current = null;
    element.scrollIntoView({ block: 'center', inline: 'nearest' });
    if (keyboard) element.focus({ preventScroll: true });
  }, []);

  const context: DeskContext = {
    state,
    dispatch,
    score,
    onsets,
    powers,
    beside,
    canWrite: (label) => powers.write && !given(label),
    neighbourSystem: (labelId, step) => findNeighbour([...geometries.current.values()], state.reading.labels, labelId, step),
    ui: {
      write: (typed) => open({ kind: 'write', typed }),
      chooseKey: () => open({ kind: 'key' }),
      split: () => open({ kind: 'split' }),
      help: () => open({ kind: 'help' }),
      remark: () => {
        setPage('remarks');
        setMarginOpen(true);
        setRemarkTurn((n) => n + 1);
      },
      zoom: (step) => setZoom((now) => stepZoom(now, step)),
      nextTab: () => setPage((now) => nextPage(now, powers, props.base !== null)),
      toggleArrows: () => setArrows((on) => !on),
      acceptFrom: () => open({ kind: 'accept-from' }),
      nameTones: () => {
        setPage('why');
        setMarginOpen(true);
        focusTones();
      },
      pattern,
      keepPattern,
      play: sound.play,
      playing: sound.playing,
      stop: sound.stop,
    },
  };
  return { context, opened, open, zoom, arrows, sound, keys, setKeys, beside, page, setPage, remarkTurn, marginOpen, setMarginOpen, isGiven: given, await: awaitLabel, drawn, noteGeometry };
}

/** The first of the notes left over, once the margin shows them. */
function focusTones(): void {
  setTimeout(() => document.querySelector<HTMLElement>('[data-left-over] select')?.focus(), 0);
}

export function useDeskState(props: DeskProps, score: Score): [DeskState, Dispatch<DeskAction>] {
  return useReducer(reduceDesk, props, ({ reading, version, openBar, openAt: tick }) => {
    const openAt = score.bars.find((bar) => openBar && bar.number === openBar && bar.start + bar.length > reading.start)?.start ?? tick;
    const desk = openDesk(reading, version);
    const opening = reading.labels.findLast((l) => openAt !== undefined && l.start <= openAt);
    return opening ? { ...desk, selectedId: opening.id } : desk;
  });
}

function firstPage({ mode, beside, openPage }: DeskProps): string {
  if (openPage) return openPage;
  if (beside) return 'beside';
  return mode === 'edit' || mode === 'read' ? 'why' : 'remarks';
}

function nextPage(now: string, powers: Powers, isKept: boolean): string {
  const pages = [...(powers.beside ? ['beside'] : []), ...(powers.proposals ? ['why', 'others'] : []), 'remarks', ...(isKept && powers.write ? ['history'] : [])];
  return pages[(pages.indexOf(now) + 1) % pages.length] ?? 'remarks';
}

function stepZoom(now: number, step: -1 | 1): number {
  const at = ZOOMS.findIndex((z) => z >= now - 0.001);
  return ZOOMS[Math.max(0, Math.min(ZOOMS.length - 1, at + step))] ?? now;
}

interface Spot {
  readonly label: Label;
  readonly x: number;
  /** Sheet and system, counted through. */
  readonly line: number;
}

function findNeighbour(sheets: readonly SheetGeometry[], labels: readonly Label[], labelId: string, step: -1 | 1): string | null {
  const sorted = [...sheets].sort((a, b) => (a.bars[0]?.bar ?? 0) - (b.bars[0]?.bar ?? 0));
  const spots = labels.flatMap((label): Spot[] => {
    const sheet = sorted.findIndex((g) => placeTick(g, label.start));
    const place = sorted[sheet] ? placeTick(sorted[sheet], label.start) : null;
    return place ? [{ label, x: place.x, line: sheet * 1000 + place.system }] : [];
  });
  const here = spots.find((s) => s.label.id === labelId);
  if (!here) return null;
  const lines = [...new Set(spots.map((s) => s.line))].sort((a, b) => a - b);
  const line = lines[lines.indexOf(here.line) + step];
  const there = spots.filter((s) => s.line === line);
  return there.reduce<Spot | null>((best, s) => (!best || Math.abs(s.x - here.x) < Math.abs(best.x - here.x) ? s : best), null)?.label.id ?? null;
}
