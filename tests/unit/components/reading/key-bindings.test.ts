// @vitest-environment jsdom
import { beforeEach, describe, expect, it } from 'vitest';
import { COMMANDS, getCommand } from '@/components/reading/commands';
import { bindKeys, keepOwnKeys, readOwnKeys, refuseKey } from '@/components/reading/key-bindings';
import { beginsNumeral } from '@/components/reading/keymap';

describe('the keys as they come', () => {
  it('give each command its own, and none begins a numeral or counts among the other readings', () => {
    const keys = COMMANDS.flatMap((command) => command.keys);
    expect(new Set(keys).size).toBe(keys.length);
    expect(keys.filter((key) => beginsNumeral(key) || /^[1-9]$/.test(key))).toEqual([]);
  });
});

describe('a key set by a person', () => {
  const join = getCommand('join');

  it('takes the place of the command’s own', () => {
    const keys = bindKeys({ join: ['Ctrl+J'] });
    expect(keys.find('Ctrl+J')).toBe(join);
    expect(keys.find('j')).toBeNull();
    expect(keys.keysOf(getCommand('split'))).toEqual(['s']);
  });

  it.each([
    ['v', 'Numerals begin with this key.'],
    ['3', 'Numbers choose among the other readings.'],
    ['Tab', 'Tab and Esc keep their meaning on every page.'],
    ['Shift+Shift', 'Press a whole key.'],
    ['Ctrl+Control', 'Press a whole key.'],
    ['s', 'This key is for “Split at a note”. Give that another one first.'],
    ['j', null],
    ['Ctrl+J', null],
  ])('%s is answered: %s', (key, answer) => {
    expect(refuseKey(bindKeys({}), join, key)).toBe(answer);
  });

  it('is free again when its command was given another', () => {
    expect(refuseKey(bindKeys({ split: ['u'] }), join, 's')).toBeNull();
  });
});

describe('what is kept in the browser', () => {
  beforeEach(() => localStorage.clear());

  it('comes back for the same person only', () => {
    keepOwnKeys(localStorage, 'ann', { join: ['u'] });
    expect(readOwnKeys(localStorage, 'ann')).toEqual({ join: ['u'] });
    expect(readOwnKeys(localStorage, 'ben')).toEqual({});
  });

  it.each(['nonsense', '[]', 'null', '{"join":"u"}', '{"join":[1]}'])('counts as nothing when it is %s', (text) => {
    localStorage.setItem('understave.keys.ann', text);
    expect(readOwnKeys(localStorage, 'ann')).toEqual({});
  });
});
