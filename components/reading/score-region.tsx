'use client';

import { useCallback, useEffect, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { BoundaryGrip } from '@/components/score/boundary-grip';
import type { SheetGeometry } from '@/components/score/geometry';
import { Lanes } from '@/components/score/lanes';
import { PlayCursor } from '@/components/score/play-cursor';
import { PointerSurface } from '@/components/score/pointer-surface';
import { ResolutionArrows } from '@/components/score/resolution-arrows';
import { LANE_ROOM, ScoreView } from '@/components/score/score-view';
import { SpanWash } from '@/components/score/span-wash';
import { type ToneMark, ToneMarks } from '@/components/score/tone-marks';
import { moveBoundary } from '@/lib/harmony/edit-spans';
import type { Label, TendencyTone } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { splitAt } from './commands';
import { ComparedLane } from './compared-lane';
import { findSelection, getSelected } from './desk-state';
import type { DeskProps } from './desk-types';
import { pressKey } from './press-key';
import { describeLabel } from './label-words';
import { NumeralEntry } from './numeral-entry';
import { ScoreTable } from './score-table';
import { SplitPicker } from './split-picker';
import type { Desk } from './use-desk';
import { findNumeralBefore, writeAt } from './written';

interface ScoreRegionProps extends Pick<DeskProps, 'firstBar' | 'lastBar' | 'feedback' | 'rules'> {
  readonly xml: string;
  readonly score: Score;
  readonly sheet: ConventionSheet;
  readonly desk: Desk;
  readonly tendencies: readonly TendencyTone[];
  readonly toneMarks: readonly ToneMark[];
}

/** The score with its lanes; the one place where the desk's keys act. */
export function ScoreRegion(props: ScoreRegionProps) {
  const { xml, score, firstBar, lastBar, sheet, desk } = props;
  const { state } = desk.context;
  const region = useRef<HTMLDivElement>(null);
  const [tables, setTables] = useState(false);
  const label = getSelected(state);
  useFocusFollows(region, label, desk);

  return (
    <div ref={region} className="min-w-0 flex-1 overflow-auto bg-sheet" data-score-region>
      <div role="application" aria-label="Score and labels" aria-describedby="desk-keys" onKeyDown={(event) => pressKey(event, desk)}>
        <p id="desk-keys" className="sr-only">Arrow keys move between labels; type to write one; question mark lists all keys. After the score, the same is given as tables.</p>
        <ScoreView
          xml={xml}
          score={score}
          firstBar={firstBar}
          lastBar={lastBar}
          zoom={desk.zoom}
          heldTick={label.start}
          room={desk.beside ? 2 * LANE_ROOM : LANE_ROOM}
          underlay={(geometry) => <Underlay geometry={geometry} desk={desk} />}
          overlay={(geometry) => <Overlay {...props} geometry={geometry} />}
        />
      </div>
      <details className="border-t border-rule p-4" onToggle={(event) => setTables(event.currentTarget.open)}>
        <summary className="caps text-small text-ink-soft">The score as tables</summary>
        {tables ? <ScoreTable score={score} firstBar={firstBar} lastBar={lastBar} reading={state.reading} sheet={sheet} /> : null}
      </details>
    </div>
  );
}

/**
 * Keeps the keyboard on the selected label once it is in the region, and gives it back when what was opened closes. In
 * the same turn as the change, so that the next key is not lost.
 */
function useFocusFollows(region: { readonly current: HTMLElement | null }, label: Label, desk: Desk): void {
  const labelId = label.id;
  const opened = desk.opened.kind;
  const before = useRef({ labelId, opened });
  useLayoutEffect(() => {
    const was = before.current;
    before.current = { labelId, opened };
    const closed = was.opened !== 'none';
    if (opened !== 'none' || !(closed || was.labelId !== labelId)) return;
    const find = () => region.current?.querySelector<HTMLElement>(`[data-label="${labelId}"]`);
    const active = document.activeElement;
    const keyboard = closed || active === document.body || (region.current?.contains(active) ?? false);
    if (!find()) desk.await(label, keyboard);
    else if (keyboard) find()?.focus();
    else find()?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
    // A dialog lets go of the keyboard only after it has closed.
    if (was.opened === 'key' || was.opened === 'help' || was.opened === 'accept-from') setTimeout(() => find()?.focus(), 0);
  });
}

function Underlay({ geometry, desk }: { readonly geometry: SheetGeometry; readonly desk: Desk }) {
  const chosen = findSelection(desk.context.state);
  return <SpanWash geometry={geometry} start={chosen[0]?.start ?? 0} end={chosen.at(-1)?.end ?? 0} />;
}

function Overlay(props: ScoreRegionProps & { readonly geometry: SheetGeometry }) {
  const { score, sheet, desk, geometry, tendencies, feedback } = props;
  const { context } = desk;
  const { state, dispatch, powers } = context;
  const { open, noteGeometry, isGiven } = desk;
  const label = getSelected(state);
  const selectedIds = useMemo(() => new Set(findSelection(state).map((l) => l.id)), [state]);
  const givenIds = useMemo(() => new Set(state.reading.labels.filter(isGiven).map((l) => l.id)), [state.reading.labels, isGiven]);
  const marks = useMemo(() => (feedback ? new Map(Object.entries(feedback)) : undefined), [feedback]);
  const describe = useCallback((l: Label) => describeLabel(score, l, sheet, isGiven(l)), [score, sheet, isGiven]);
  const onSelect = useCallback((labelId: string, extend: boolean) => dispatch({ kind: 'select', labelId, extend }), [dispatch]);
  const onOpen = useCallback(() => powers.write && open({ kind: 'write', typed: null }), [powers.write, open]);
  useEffect(() => noteGeometry(geometry), [noteGeometry, geometry]);

  const labelAt = (tick: number) => state.reading.labels.findLast((l) => l.start <= tick);
  return (
    <>
      <PointerSurface
        geometry={geometry}
        onsets={context.onsets}
        onPress={(tick, extend) => onSelect(labelAt(tick)?.id ?? '', extend)}
        onDrag={(tick) => onSelect(labelAt(tick)?.id ?? '', true)}
      />
      <PlayCursor geometry={geometry} place={desk.sound.place} />
      <ToneMarks geometry={geometry} score={score} marks={props.toneMarks} />
      <ResolutionArrows geometry={geometry} score={score} tones={tendencies} />
      <Lanes
        geometry={geometry}
        reading={state.reading}
        sheet={sheet}
        currentId={label.id}
        selectedIds={selectedIds}
        givenIds={givenIds}
        {...(marks ? { marks } : {})}
        describe={describe}
        onSelect={onSelect}
        onOpen={onOpen}
        onOpenKey={powers.keys ? (start) => {
          const begun = state.reading.labels.find((l) => l.start >= start);
          if (begun) onSelect(begun.id, false);
          desk.open({ kind: 'key' });
        } : undefined}
        entry={<Entry score={score} sheet={sheet} desk={desk} />}
      />
      {desk.beside ? <ComparedLane geometry={geometry} beside={desk.beside} sheet={sheet} onSelect={(l) => onSelect(labelAt(l.start)?.id ?? '', false)} /> : null}
      {powers.spans ? (
        <BoundaryGrip
          geometry={geometry}
          start={label.start}
          onsets={context.onsets}
          onMove={(tick) => dispatch({ kind: 'edit', editId: crypto.randomUUID(), result: moveBoundary(state.reading, label.id, tick), words: 'Moved where the label begins.' })}
        />
      ) : null}
    </>
  );
}

/** The line that is typed into, or the choice of where to split. */
function Entry({ score, sheet, desk }: Pick<ScoreRegionProps, 'score' | 'sheet' | 'desk'>) {
  const { context, opened, open } = desk;
  const { state, dispatch } = context;
  const label = getSelected(state);
  const close = () => open({ kind: 'none' });
  if (opened.kind === 'split') {
    return (
      <SplitPicker
        score={score}
        label={label}
        onsets={context.onsets}
        onCancel={close}
        onSplit={(tick) => {
          splitAt(context, tick);
          close();
        }}
      />
    );
  }
  if (opened.kind !== 'write') return null;
  return (
    <NumeralEntry
      key={label.id}
      label={label}
      score={score}
      sheet={sheet}
      previous={findNumeralBefore(state.reading, label)}
      typed={opened.typed}
      compares={context.powers.proposals}
      onCancel={close}
      onWrite={(written, onward) => {
        const { labels } = state.reading;
        const next = labels[labels.findIndex((l) => l.id === label.id) + (onward || 1)];
        const result = writeAt(state.reading, label, written);
        const settled = !result.ok && result.error.kind === 'nothing_changes';
        if (settled && next) dispatch({ kind: 'select', labelId: next.id });
        else dispatch({ kind: 'edit', editId: crypto.randomUUID(), result, words: written.numeral ? 'Wrote a numeral.' : 'Left a blank.', ...(next ? { selectId: next.id } : {}) });
        open(onward !== 0 && next && context.canWrite(next) ? { kind: 'write', typed: null } : { kind: 'none' });
      }}
    />
  );
}
