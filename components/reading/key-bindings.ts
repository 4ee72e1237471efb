import { COMMANDS, type Command } from './commands';
import { beginsNumeral } from './keymap';

/** Which keys give which command: those of the command, unless the person set others. */
export interface KeyBindings {
  keysOf(command: Command): readonly string[];
  /** The command a key gives, null for none. */
  find(key: string): Command | null;
}

/** Keys a person set, by command; an empty list leaves the command without a key. */
export type OwnKeys = Readonly<Partial<Record<string, readonly string[]>>>;

export function bindKeys(own: OwnKeys): KeyBindings {
  const keysOf = (command: Command) => own[command.id] ?? command.keys;
  return { keysOf, find: (key) => COMMANDS.find((command) => keysOf(command).includes(key)) ?? null };
}

/** Why a key cannot be set for a command; null when it can. */
export function refuseKey(bindings: KeyBindings, command: Command, key: string): string | null {
  if (/^(Ctrl\+|Alt\+)?(Shift\+)?(Control|Shift|Alt|Meta|AltGraph|CapsLock|Dead|Process|Unidentified)$/.test(key)) return 'Press a whole key.';
  if (key === 'Tab' || key === 'Shift+Tab' || key === 'Escape') return 'Tab and Esc keep their meaning on every page.';
  if (beginsNumeral(key)) return 'Numerals begin with this key.';
  if (/^[1-9]$/.test(key)) return 'Numbers choose among the other readings.';
  const taken = bindings.find(key);
  return taken && taken.id !== command.id ? `This key is for “${taken.words}”. Give that another one first.` : null;
}

const STORED = 'understave.keys';

/** Kept in the browser, for the person. What cannot be read counts as nothing set. */
export function readOwnKeys(storage: Storage, userId: string): OwnKeys {
  try {
    const stored: unknown = JSON.parse(storage.getItem(`${STORED}.${userId}`) ?? '{}');
    if (typeof stored !== 'object' || stored === null) return {};
    const isKeys = (keys: unknown): keys is string[] => Array.isArray(keys) && keys.every((key) => typeof key === 'string');
    return Object.fromEntries(Object.entries(stored).filter((entry): entry is [string, string[]] => isKeys(entry[1])));
  } catch {
    return {};
  }
}

export function keepOwnKeys(storage: Storage, userId: string, own: OwnKeys): void {
  storage.setItem(`${STORED}.${userId}`, JSON.stringify(own));
}
