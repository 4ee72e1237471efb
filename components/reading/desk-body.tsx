'use client';

import { useCallback, useEffect, useMemo } from 'react';
import { isSettled } from '@/components/score/label-look';
import { namePlace } from '@/components/score/beats';
import type { Score } from '@/lib/score/score';
import { findNextOpen, runCommand } from './commands';
import { DeskDialogs } from './desk-dialogs';
import { getSelected } from './desk-state';
import type { DeskProps } from './desk-types';
import { Ledger } from './ledger';
import { Margin } from './margin';
import { marginPages } from './margin-pages';
import { ScoreRegion } from './score-region';
import { SoundStrip } from './sound-strip';
import { Toolbar } from './toolbar';
import { useDesk, useDeskState } from './use-desk';
import { useRemarks } from './use-remarks';
import { useSaving } from './use-saving';
import { findToneMarks } from './tone-marks';
import { useSpelling } from './use-spelling';
import { useWhy } from './use-why';

interface DeskBodyProps extends DeskProps {
  readonly xml: string;
  readonly score: Score;
}

const WIDE = 1024;

/** The desk with its score read. */
export function DeskBody(props: DeskBodyProps) {
  const { score, base, mode, firstBar, lastBar, onProgress, onSaving } = props;
  const spelling = useSpelling(props);
  const { sheet } = spelling;
  const [state, dispatch] = useDeskState(props, score);
  const desk = useDesk(props, score, typeof window !== 'undefined' && window.innerWidth < WIDE ? 0.7 : 0.8, state, dispatch);
  const { context, isGiven } = desk;
  const saving = useSaving(context.powers.write ? base : null, props.userId, state, dispatch);
  const remarks = useRemarks(base);
  const label = getSelected(state);
  const why = useWhy(context.powers.proposals && desk.drawn ? score : null, state.reading, label.id);
  const toneMarks = useMemo(() => findToneMarks(state.reading, label.id, desk.arrows ? why : null), [state.reading, label.id, desk.arrows, why]);
  const settled = useMemo(() => state.reading.labels.filter((l) => !isGiven(l) && isSettled(l)).length, [state.reading.labels, isGiven]);

  const selectLabel = useCallback((labelId: string) => dispatch({ kind: 'select', labelId }), [dispatch]);

  useEffect(() => onProgress?.(settled, state.reading.labels.length), [onProgress, settled, state.reading.labels.length]);

  useEffect(() => onSaving?.(saving.state), [onSaving, saving.state]);

  const pages = marginPages({ base, desk, score, sheet, state, dispatch, label, why, remarks });

  return (
    <div className="flex h-full min-h-0 flex-col overflow-hidden">
      <Toolbar context={context} keys={desk.keys} spelling={spelling} saving={context.powers.write && base ? saving : null} heading={props.heading} actions={props.actions} zoom={desk.zoom} arrows={desk.arrows} onMargin={() => desk.setMarginOpen(!desk.marginOpen)} />
      <div className="relative flex min-h-0 flex-1">
        <ScoreRegion {...props} sheet={sheet} desk={desk} tendencies={desk.arrows && why ? why.tendencyTones : []} toneMarks={toneMarks} />
        <aside
          aria-label="Margin"
          className={
            desk.marginOpen
              ? 'absolute inset-x-0 bottom-0 z-20 max-h-[70%] overflow-y-auto border-t-2 border-ink bg-paper lg:static lg:max-h-none lg:w-[22rem] lg:shrink-0 lg:border-t-0 lg:border-l lg:border-rule-strong'
              : 'hidden w-[22rem] shrink-0 overflow-y-auto border-l border-rule-strong bg-paper lg:block'
          }
        >
          <Margin
            label={label}
            place={namePlace(score, label.start)}
            sheet={sheet}
            given={isGiven(label)}
            feedback={mode === 'feedback' ? props.feedback?.[label.id] : undefined}
            pages={pages}
            page={desk.page}
            onPage={desk.setPage}
            onAccept={context.powers.write && label.state === 'suggested' && label.numeral ? () => runCommand(context, 'accept') : undefined}
            onClose={() => desk.setMarginOpen(false)}
          />
        </aside>
      </div>
      <SoundStrip context={context} score={score} sound={desk.sound} />
      <Ledger
        score={score}
        firstBar={firstBar}
        lastBar={lastBar}
        reading={state.reading}
        selected={label}
        isGiven={isGiven}
        onSelect={selectLabel}
        onNextOpen={context.powers.write ? () => runCommand(context, findNextOpen(state, context.canWrite) ? 'next-open' : 'last') : undefined}
      />
      <DeskDialogs desk={desk} score={score} sheet={sheet} />
      <p role="status" aria-live="polite" className="sr-only" key={state.said.count}>{state.said.text}</p>
    </div>
  );
}
