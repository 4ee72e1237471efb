'use client';

import { type KeyboardEvent, useState } from 'react';
import { Dialog } from '@/components/ui';
import { COMMANDS, COMMAND_GROUPS, type Command, isOffered } from './commands';
import type { Powers } from './desk-types';
import { type KeyBindings, refuseKey } from './key-bindings';
import { nameKey, showKey } from './keymap';

interface HelpSheetProps {
  readonly open: boolean;
  onOpenChange(open: boolean): void;
  readonly powers: Powers;
  readonly keys: KeyBindings;
  /** Sets the keys of a command; null gives it its own again. */
  onSet(commandId: string, keys: readonly string[] | null): void;
}

/** Every command of this desk with its keys, each of which can be set anew. */
export function HelpSheet({ open, onOpenChange, powers, keys, onSet }: HelpSheetProps) {
  const [setting, setSetting] = useState<string | null>(null);
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keys" wide description="They act while the score has the keyboard: press a label, or reach the score with Tab. Press a key here to set another.">
      <div className="gap-x-10 sm:columns-2">
        {powers.write ? <Writing proposals={powers.proposals} /> : null}
        {COMMAND_GROUPS.map((group) => {
          const offered = COMMANDS.filter((command) => command.group === group && isOffered(command, powers));
          if (offered.length === 0) return null;
          return (
            <section key={group} className="mb-4 break-inside-avoid">
              <h3 className="caps mb-1 border-b border-rule text-small text-ink-soft">{group}</h3>
              <dl className="grid grid-cols-[1fr_auto] gap-x-4">
                {offered.map((command) => (
                  <div key={command.id} className="col-span-2 grid grid-cols-subgrid">
                    <dt>{command.words}</dt>
                    <dd className="text-right">
                      {setting === command.id ? (
                        <Setting command={command} keys={keys} onSet={(set) => onSet(command.id, set)} onDone={() => setSetting(null)} />
                      ) : (
                        <button type="button" aria-label={`${command.words}: ${keys.keysOf(command).map(showKey).join(' or ') || 'no key'}. Set another`} className="min-h-6 hover:underline" onClick={() => setSetting(command.id)}>
                          {keys.keysOf(command).map((key) => <kbd key={key} className="ml-2 border border-rule-strong bg-bench px-1.5 font-sans text-small">{showKey(key)}</kbd>)}
                          {keys.keysOf(command).length === 0 ? <i className="text-small text-ink-soft">none</i> : null}
                        </button>
                      )}
                    </dd>
                  </div>
                ))}
              </dl>
            </section>
          );
        })}
      </div>
    </Dialog>
  );
}

function Writing({ proposals }: { readonly proposals: boolean }) {
  return (
    <p className="mb-4 break-inside-avoid text-small">
      To write, just type: <kbd>V65/V</kbd>, <kbd>viio7</kbd>, <kbd>N6</kbd>. A key before it with a colon changes the key from there: <kbd>d: iv6</kbd>. <kbd>Enter</kbd> writes, <kbd>Tab</kbd> writes and opens the next label, <kbd>Esc</kbd> leaves.
      {proposals ? <> <kbd>1</kbd> to <kbd>9</kbd> take one of the other readings.</> : null}
    </p>
  );
}

interface SettingProps {
  readonly command: Command;
  readonly keys: KeyBindings;
  onSet(keys: readonly string[] | null): void;
  onDone(): void;
}

/** Waits for the key to set. */
function Setting({ command, keys, onSet, onDone }: SettingProps) {
  const [refusal, setRefusal] = useState<string | null>(null);
  const press = (event: KeyboardEvent) => {
    if (event.key === 'Tab') return onDone();
    event.preventDefault();
    event.stopPropagation();
    const key = nameKey(event);
    if (key === 'Escape') return onDone();
    const why = refuseKey(keys, command, key);
    setRefusal(why);
    if (why) return;
    onSet([key]);
    onDone();
  };
  return (
    <span className="flex flex-col items-end gap-1 text-small">
      <span className="flex gap-2">
        <button type="button" autoFocus className="min-h-6 border border-ink px-2" onKeyDown={press}>Press a key</button>
        <button type="button" className="link min-h-6" onClick={() => {
          onSet(null);
          onDone();
        }}>
          As it was
        </button>
      </span>
      {refusal ? <span role="alert" className="max-w-56 text-madder">{refusal}</span> : null}
    </span>
  );
}
