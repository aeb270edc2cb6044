import { describe, expect, it } from 'vitest';
import { COMMAND_IDS, COMMANDS, comboOf, keyFault, keyName } from './commands.ts';

describe('the keys of the detection page', () => {
  it('are all different, one of each command', () => {
    expect(COMMANDS.map(({ id }) => id).sort()).toEqual([...COMMAND_IDS].sort());
    const combos = COMMANDS.flatMap(({ combo, also }) => (also ? [combo, also] : [combo]));
    expect(new Set(combos).size).toBe(combos.length);
  });

  it('can be set otherwise, but not to a key of another command or of the page', () => {
    expect(comboOf('agree', { agree: 'a' })).toBe('a');
    expect(comboOf('next', { agree: 'a' })).toBe('j');
    expect(keyFault('agree', 'a', {})).toBeUndefined();
    expect(keyFault('agree', 'enter', {})).toBeUndefined();
    expect(keyFault('agree', 'j', {})).toContain('next');
    expect(keyFault('agree', 'arrowleft', {})).toContain('previous');
    // A key that was given away is free.
    expect(keyFault('agree', 'j', { next: 'f' })).toBeUndefined();
    for (const combo of ['?', 'escape', 'tab', 'ctrl+r', 'shift', ''])
      expect(keyFault('agree', combo, {})).toBeTruthy();
  });

  it('are written as one sees them on a keyboard', () => {
    expect(['enter', 'j', 'shift+j', 'arrowleft', '['].map(keyName)).toEqual(['Enter', 'J', 'Shift J', '←', '[']);
  });
});
