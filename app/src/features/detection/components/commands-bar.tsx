import { HotkeysContext, useHotkeys } from '@blueprintjs/core';
import { useContext, useMemo } from 'react';
import { Caution } from '#components/caution/caution.tsx';
import { usePreferences } from '#lib/preferences.ts';

/** One thing that can be done on the page; its key, its button and its line in the help come from the same place. */
export interface Command {
  combo: string;
  /** How the key is written on the button. */
  keyName: string;
  label: string;
  group: string;
  disabled?: boolean;
  /** Off the bar: only the key and the help. */
  hidden?: boolean;
  run: () => void;
}

const KEYED = new Set(['BUTTON', 'A', 'INPUT', 'TEXTAREA', 'SELECT']);

/** Enter on a focused button presses that button; it must not also agree with a verdict. */
const ownsEnter = (combo: string) => combo === 'enter' && KEYED.has(document.activeElement?.tagName ?? '');

export function CommandsBar({ commands }: { commands: readonly Command[] }) {
  const { shortcuts } = usePreferences();
  const [, dispatch] = useContext(HotkeysContext);
  const hotkeys = useMemo(
    () =>
      shortcuts
        ? commands.map(({ combo, label, group, disabled, run }) => ({
            combo,
            label,
            group,
            global: true,
            disabled: disabled ?? false,
            preventDefault: combo.startsWith('arrow'),
            onKeyDown: () => {
              if (!ownsEnter(combo)) run();
            },
          }))
        : [],
    [commands, shortcuts],
  );
  useHotkeys(hotkeys);
  return (
    <footer className="keys-footer" aria-label="Commands">
      {commands
        .filter(({ hidden }) => !hidden)
        .map(({ combo, keyName, label, disabled, run }) => (
          <button
            key={combo}
            type="button"
            disabled={disabled}
            onClick={run}
            aria-keyshortcuts={shortcuts ? combo : undefined}
          >
            {shortcuts && <kbd aria-hidden="true">{keyName}</kbd>}
            {label}
          </button>
        ))}
      <span className="grow" />
      <Caution />
      {shortcuts && (
        <button type="button" className="keys-footer__help" onClick={() => dispatch({ type: 'OPEN_DIALOG' })}>
          <kbd>?</kbd> keys
        </button>
      )}
    </footer>
  );
}
