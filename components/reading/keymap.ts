/** The desk's keys. They act only while the score region has the keyboard (WCAG 2.1.4). */

/** `Ctrl+Shift+Z`, `ArrowLeft`, `?`. Shift is named only where the character does not show it. Command counts as Ctrl. */
export function nameKey(event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey'>): string {
  const isCharacter = [...event.key].length === 1 && event.key !== ' ';
  const chord = event.ctrlKey || event.metaKey;
  const key = event.key === ' ' ? 'Space' : isCharacter && chord ? event.key.toUpperCase() : event.key;
  const shift = event.shiftKey && (!isCharacter || chord) ? 'Shift+' : '';
  return `${chord ? 'Ctrl+' : ''}${event.altKey ? 'Alt+' : ''}${shift}${key}`;
}

/**
 * Characters that what is written at a label can begin with: a numeral, or the key it is read in (`d: iv`). Typed on the
 * score they open the label for writing. No command uses one of them.
 */
const NUMERAL_START = /^[a-gA-GiInNpPvV#♭♯♮]$/u;

export function beginsNumeral(key: string): boolean {
  return NUMERAL_START.test(key);
}

const NAMES: Readonly<Record<string, string>> = {
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  Escape: 'Esc',
  Space: 'Space bar',
};

/** A key as it is printed on the help sheet. */
export function showKey(key: string): string {
  return key.split(/\+(?=.)/).map((part) => NAMES[part] ?? part).join(' ');
}
