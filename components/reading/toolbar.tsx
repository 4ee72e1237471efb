'use client';

import type { ReactNode } from 'react';
import { Button, Mark, Menu, MenuAction, MenuChoice, MenuHeading, MenuRule, Spinner, classNames } from '@/components/ui';
import { type DeskContext, getCommand, isOffered, runCommand } from './commands';
import type { KeyBindings } from './key-bindings';
import { showKey } from './keymap';
import type { Saving } from './use-saving';
import type { SpellingChoice } from './use-spelling';

interface ToolbarProps {
  readonly context: DeskContext;
  readonly keys: KeyBindings;
  readonly spelling: SpellingChoice;
  readonly saving: Saving | null;
  readonly heading: ReactNode;
  readonly actions: ReactNode;
  readonly zoom: number;
  readonly arrows: boolean;
  /** Below the desk's wide layout: opens the margin. */
  onMargin(): void;
}

/** The commands for mouse and touch; the same as the keys'. */
export function Toolbar({ context, keys, spelling, saving, heading, actions, zoom, arrows, onMargin }: ToolbarProps) {
  const { powers, state } = context;
  return (
    <div role="toolbar" aria-label="Desk" className="flex flex-wrap items-center gap-x-3 gap-y-1 border-b border-rule-strong bg-paper px-3 py-1.5">
      <div className="mr-auto min-w-0 shrink truncate">{heading}</div>
      {saving ? <SaveMark saving={saving} onChoose={() => context.dispatch({ kind: 'choose-now' })} /> : null}
      {powers.write ? (
        <span className="flex items-center">
          <Tool context={context} keys={keys} id="undo" disabled={state.undo.length === 0}>Undo</Tool>
          <Tool context={context} keys={keys} id="redo" disabled={state.redo.length === 0}>Redo</Tool>
        </span>
      ) : null}
      {powers.write ? (
        <span className="flex items-center gap-1">
          {powers.proposals ? <Tool context={context} keys={keys} id="accept" kind="plain">Accept</Tool> : null}
          <Tool context={context} keys={keys} id="write" kind="plain">Write</Tool>
        </span>
      ) : null}
      {powers.write || spelling.spellings.length > 0 ? <MoreMenu context={context} spelling={spelling} /> : null}
      <span className="flex items-center">
        <Tool context={context} keys={keys} id="play" label={context.ui.playing ? 'Stop' : 'Play from here'}>{context.ui.playing ? 'Stop' : 'Play'}</Tool>
        {powers.proposals ? <Tool context={context} keys={keys} id="arrows" pressed={arrows}>Resolutions</Tool> : null}
        <Tool context={context} keys={keys} id="smaller" label="Smaller">−</Tool>
        <span className="tabular hidden w-11 text-center text-small sm:inline" aria-live="polite">{Math.round(zoom * 100)} %</span>
        <Tool context={context} keys={keys} id="larger" label="Larger">+</Tool>
        <Tool context={context} keys={keys} id="help" label="All keys" wideOnly>?</Tool>
      </span>
      <Button size="small" kind="plain" className="lg:hidden" onClick={onMargin}>Margin</Button>
      {actions}
    </div>
  );
}

interface ToolProps {
  readonly context: DeskContext;
  readonly keys: KeyBindings;
  readonly id: string;
  readonly label?: string;
  readonly kind?: 'plain' | 'quiet';
  readonly disabled?: boolean;
  readonly pressed?: boolean;
  /** Of no use on a phone. */
  readonly wideOnly?: boolean;
  readonly children: ReactNode;
}

function Tool({ context, keys, id, label, kind = 'quiet', disabled = false, pressed, wideOnly = false, children }: ToolProps) {
  const command = getCommand(id);
  if (!isOffered(command, context.powers)) return null;
  return (
    <Button
      size="small"
      kind={kind}
      disabled={disabled}
      title={[command.words, ...keys.keysOf(command).slice(0, 1).map((key) => `(${showKey(key)})`)].join(' ')}
      aria-label={label}
      aria-pressed={pressed}
      className={classNames('min-w-8', pressed && 'bg-selection', wideOnly && 'max-sm:hidden')}
      onClick={() => runCommand(context, id)}
    >
      {children}
    </Button>
  );
}

const MORE = [
  { title: 'Accept', ids: ['accept-bar', 'accept-so-far', 'accept-from'] },
  { title: 'Label', ids: ['blank', 'split', 'join', 'start-earlier', 'start-later', 'copy', 'paste', 'tones'] },
  { title: 'Key', ids: ['key', 'exchange', 'pivot'] },
] as const;

function MoreMenu({ context, spelling }: { readonly context: DeskContext; readonly spelling: SpellingChoice }) {
  return (
    <Menu trigger={<Button size="small">More</Button>}>
      {MORE.map(({ title, ids }) => {
        const offered = ids.map(getCommand).filter((command) => isOffered(command, context.powers));
        if (offered.length === 0) return null;
        return (
          <div key={title}>
            <MenuHeading>{title}</MenuHeading>
            {offered.map((command) => <MenuAction key={command.id} onSelect={() => runCommand(context, command.id)}>{command.words}</MenuAction>)}
            <MenuRule />
          </div>
        );
      })}
      <MenuAction onSelect={() => runCommand(context, 'remark')}>Write a remark</MenuAction>
      {spelling.spellings.length > 0 ? (
        <>
          <MenuRule />
          <MenuHeading>Labels are spelled</MenuHeading>
          <MenuChoice value={spelling.chosenId} onValueChange={spelling.choose} choices={spelling.spellings.map(({ id, name }) => ({ value: id, label: name }))} />
        </>
      ) : null}
    </Menu>
  );
}

const SAVE_LOOKS = {
  saved: { tone: 'settled', shape: 'check', words: 'Saved' },
  saving: { tone: 'plain', shape: 'dots', words: 'Saving' },
  'kept-here': { tone: 'eye', shape: 'triangle', words: 'Not saved, kept here' },
  'signed-out': { tone: 'eye', shape: 'triangle', words: 'Signed out, kept here' },
  overtaken: { tone: 'eye', shape: 'triangle', words: 'Two versions' },
  refused: { tone: 'eye', shape: 'cross', words: 'Not taken' },
} as const;

function SaveMark({ saving, onChoose }: { readonly saving: Saving; onChoose(): void }) {
  const look = SAVE_LOOKS[saving.state];
  const stuck = saving.state === 'kept-here' || saving.state === 'signed-out' || saving.state === 'refused';
  return (
    <span role="status" data-save-state={saving.state} className="flex items-center gap-2 text-small">
      {saving.state === 'saving' ? <Spinner label="" /> : null}
      <Mark tone={look.tone} shape={look.shape}>{look.words}</Mark>
      {saving.message ? <span className="text-madder">{saving.message}</span> : null}
      {saving.state === 'signed-out' ? <a className="link" href="/sign-in" target="_blank" rel="noreferrer">Sign in</a> : null}
      {saving.state === 'overtaken' ? <button type="button" className="link min-h-6" onClick={onChoose}>Choose</button> : null}
      {stuck ? <button type="button" className="link min-h-6" onClick={saving.retry}>Try now</button> : null}
    </span>
  );
}
