import { HotkeysContext, useHotkeys } from '@blueprintjs/core';
import { useContext, useMemo } from 'react';
import { Caution } from '#components/caution/caution.tsx';
import { COMMANDS, comboOf, keyName, type CommandId } from '#lib/keys/commands.ts';
import { usePreferences } from '#lib/preferences.ts';

/** What a command does here; its key, its button and its line in the help come from the one list of commands. */
export interface Command {
  id: CommandId;
  /** Where it says more than the list. */
  label?: string;
  disabled?: boolean;
  /** On the bar as a button; the others have their key and the help. */
  onBar?: boolean;
  run: () => void;
}

const KEYED = new Set(['BUTTON', 'A', 'INPUT', 'TEXTAREA', 'SELECT', 'SUMMARY']);
/** Enter and the space bar on a focused control press that control; they must not also decide. */
const ownsKey = (combo: string) => combo === 'enter' && KEYED.has(document.activeElement?.tagName ?? '');

export function CommandsBar({ commands }: { commands: readonly Command[] }) {
  const { shortcuts, keys } = usePreferences();
  const [, dispatch] = useContext(HotkeysContext);
  const known = useMemo(
    () =>
      COMMANDS.flatMap((entry) => {
        const command = commands.find(({ id }) => id === entry.id);
        if (!command) return [];
        const combo = comboOf(entry.id, keys);
        return [{ ...entry, ...command, label: command.label ?? entry.label, combo }];
      }),
    [commands, keys],
  );
  const hotkeys = useMemo(
    () =>
      shortcuts
        ? known.flatMap(({ combo, also, label, group, disabled, run }) =>
            (also ? [combo, also] : [combo]).map((key) => ({
              combo: key,
              label,
              group,
              global: true,
              disabled: disabled ?? false,
              preventDefault: key.startsWith('arrow'),
              onKeyDown: (event: KeyboardEvent) => {
                // A key that is held down must not decide on one detection after the other.
                if (!ownsKey(key) && !(event.repeat && group === 'Decide')) run();
              },
            })),
          )
        : [],
    [known, shortcuts],
  );
  useHotkeys(hotkeys, { showDialogKeyCombo: shortcuts ? '?' : (false as unknown as string) });
  return (
    <footer className="keys-footer" aria-label="Commands">
      {known
        .filter(({ onBar }) => onBar)
        .map(({ id, combo, label, disabled, run }) => (
          <button
            key={id}
            type="button"
            disabled={disabled}
            onClick={run}
            aria-keyshortcuts={shortcuts ? combo : undefined}
          >
            {shortcuts && <kbd aria-hidden="true">{keyName(combo)}</kbd>}
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
