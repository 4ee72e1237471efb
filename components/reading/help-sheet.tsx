'use client';

import { Dialog } from '@/components/ui';
import { COMMANDS, COMMAND_GROUPS, isOffered } from './commands';
import type { Powers } from './desk-types';
import { showKey } from './keymap';

/** Every command of this desk with its keys. */
export function HelpSheet({ open, onOpenChange, powers }: { readonly open: boolean; onOpenChange(open: boolean): void; readonly powers: Powers }) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keys" wide description="They act while the score has the keyboard: press a label, or reach the score with Tab.">
      <div className="gap-x-10 sm:columns-2">
        {powers.write ? (
          <p className="mb-4 break-inside-avoid text-small">
            To write, just type: <kbd>V65/V</kbd>, <kbd>viio7</kbd>, <kbd>N6</kbd>. A key before it with a colon changes the key from there: <kbd>d: iv6</kbd>. <kbd>Enter</kbd> writes, <kbd>Tab</kbd> writes and opens the next label, <kbd>Esc</kbd> leaves.
            {powers.proposals ? <> <kbd>1</kbd> to <kbd>9</kbd> take one of the other readings.</> : null}
          </p>
        ) : null}
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
                    <dd className="text-right">{command.keys.map((key) => <kbd key={key} className="ml-2 border border-rule-strong bg-bench px-1.5 font-sans text-small">{showKey(key)}</kbd>)}</dd>
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
