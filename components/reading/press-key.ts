import type { KeyboardEvent } from 'react';
import { chooseOther, runCommand } from './commands';
import { getSelected } from './desk-state';
import { beginsNumeral, nameKey } from './keymap';
import type { Desk } from './use-desk';

/** What a key pressed on the score does: a command, one of the other readings by number, or the beginning of a numeral. */
export function pressKey(event: KeyboardEvent, desk: Desk): void {
  const { context } = desk;
  if (event.defaultPrevented || (event.target as HTMLElement).closest('button, input, textarea, summary')) return;
  const key = nameKey(event);
  const label = getSelected(context.state);
  const command = desk.keys.find(key);
  if (command) {
    event.preventDefault();
    return runCommand(context, command.id);
  }
  if (event.ctrlKey || event.metaKey || event.altKey || !context.powers.write) return;
  const other = /^[1-9]$/.test(key) && context.powers.proposals ? label.others[Number(key) - 1] : undefined;
  if (other) {
    event.preventDefault();
    return chooseOther(context, other);
  }
  if (!beginsNumeral(key)) return;
  event.preventDefault();
  if (context.canWrite(label)) context.ui.write(key);
  else context.dispatch({ kind: 'say', text: 'This label is given and not to be changed.' });
}
