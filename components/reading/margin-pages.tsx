import type { Dispatch } from 'react';
import { findBar, namePlace } from '@/components/score/beats';
import { markTone } from '@/lib/harmony/edit';
import type { Label, NonChordKind, Why } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { chooseOther } from './commands';
import type { DeskAction, DeskState } from './desk-state';
import { DifferencesPanel } from './differences-panel';
import { HistoryPanel } from './history-panel';
import { TONE_WORDS } from './label-words';
import type { MarginPage } from './margin';
import { OthersPanel } from './others-panel';
import { RemarksPanel } from './remarks-panel';
import type { Desk } from './use-desk';
import type { Remarks } from './use-remarks';
import { WhyPanel } from './why-panel';

interface Shown {
  readonly base: string | null;
  readonly desk: Desk;
  readonly score: Score;
  readonly sheet: ConventionSheet;
  readonly state: DeskState;
  readonly dispatch: Dispatch<DeskAction>;
  readonly label: Label;
  readonly why: Why | null;
  readonly remarks: Remarks;
}

/** The pages of the margin that this desk has, in order. */
export function marginPages(shown: Shown): MarginPage[] {
  const { powers } = shown.desk.context;
  return [
    ...(shown.desk.beside ? [differencesPage(shown)] : []),
    ...(powers.proposals ? [whyPage(shown), othersPage(shown)] : []),
    remarksPage(shown),
    ...(shown.base && powers.write ? [historyPage(shown, shown.base)] : []),
  ];
}

function differencesPage({ desk, score, sheet }: Shown): MarginPage {
  const { beside, context } = desk;
  const takes = context.powers.spans && context.powers.keys;
  return {
    value: 'beside',
    label: `Differences ${beside?.differences.length || ''}`,
    content: beside ? <DifferencesPanel beside={beside} score={score} sheet={sheet} takes={takes} /> : null,
  };
}

function whyPage({ desk, score, state, dispatch, label, why }: Shown): MarginPage {
  const mark = (noteId: number, kind: NonChordKind | null) => {
    const words = kind ? `Named a note: ${TONE_WORDS[kind]}.` : 'Took back what a note was named.';
    dispatch({ kind: 'edit', editId: crypto.randomUUID(), result: markTone(state.reading, label.id, noteId, kind), words });
  };
  const onMark = desk.context.canWrite(label) ? mark : undefined;
  return { value: 'why', label: 'Why', content: <WhyPanel score={score} label={label} why={why} onMark={onMark} /> };
}

function othersPage({ desk, score, sheet, label }: Shown): MarginPage {
  const { context } = desk;
  return {
    value: 'others',
    label: `Others ${label.others.length || ''}`,
    content: <OthersPanel score={score} label={label} sheet={sheet} onChoose={context.powers.write ? (other) => chooseOther(context, other) : undefined} />,
  };
}

function remarksPage({ desk, score, dispatch, label, remarks }: Shown): MarginPage {
  return {
    value: 'remarks',
    label: `Remarks ${remarks.all.filter((r) => r.labelId === label.id).length || ''}`,
    content: (
      <RemarksPanel
        remarks={remarks}
        label={label}
        barIndex={findBar(score, label.start)?.index ?? 0}
        place={namePlace(score, label.start)}
        focusTurn={desk.remarkTurn}
        onGoTo={(labelId) => dispatch({ kind: 'select', labelId })}
      />
    ),
  };
}

function historyPage({ state, dispatch, score, sheet }: Shown, base: string): MarginPage {
  return { value: 'history', label: 'History', content: <HistoryPanel base={base} desk={state} dispatch={dispatch} score={score} sheet={sheet} /> };
}
