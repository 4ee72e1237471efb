'use client';

import { namePlace } from '@/components/score/beats';
import { layOver } from '@/lib/harmony/edit-merge';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { AcceptDialog } from './accept-dialog';
import { acceptCertain } from './commands';
import { ConflictDialog } from './conflict-dialog';
import { getSelected } from './desk-state';
import { HelpSheet } from './help-sheet';
import { KeyDialog } from './key-dialog';
import type { Desk } from './use-desk';

/** What stands over the desk: the key's dialog, the keys' sheet, and the choice between two versions. */
export function DeskDialogs({ desk, score, sheet }: { readonly desk: Desk; readonly score: Score; readonly sheet: ConventionSheet }) {
  const { context, opened, open } = desk;
  const { state, dispatch } = context;
  const label = getSelected(state);
  const { conflict } = state;
  const close = () => open({ kind: 'none' });
  return (
    <>
      <HelpSheet open={opened.kind === 'help'} onOpenChange={(is) => !is && close()} powers={context.powers} keys={desk.keys} onSet={desk.setKeys} />
      {opened.kind === 'key' ? (
        <KeyDialog
          reading={state.reading}
          label={label}
          place={namePlace(score, label.start)}
          sheet={sheet}
          onEdit={(result, words) => dispatch({ kind: 'edit', editId: crypto.randomUUID(), result, words })}
          onClose={close}
        />
      ) : null}
      {opened.kind === 'accept-from' ? <AcceptDialog reading={state.reading} onAccept={(atLeast) => acceptCertain(context, atLeast)} onClose={close} /> : null}
      {conflict ? (
        <ConflictDialog
          conflict={conflict}
          score={score}
          sheet={sheet}
          onPutOff={() => dispatch({ kind: 'put-off' })}
          onTakeTheirs={() => dispatch({ kind: 'take-theirs' })}
          onPutMine={() => dispatch({ kind: 'put-mine', editId: crypto.randomUUID(), change: layOver(conflict.theirs, conflict.edit.change, () => crypto.randomUUID()) })}
        />
      ) : null}
    </>
  );
}
