import { Button, getKeyComboString } from '@blueprintjs/core';
import { useState } from 'react';
import { COMMANDS, comboOf, keyFault, keyName, type CommandId } from '#lib/keys/commands.ts';
import { setPreferences, usePreferences } from '#lib/preferences.ts';
import './key-settings.css';

/** Every key of the detection page, to be set otherwise: press the button, then the key. */
export function KeySettings() {
  const { keys } = usePreferences();
  const [asking, setAsking] = useState<CommandId | null>(null);
  const [fault, setFault] = useState<{ id: CommandId; text: string } | null>(null);
  const take = (id: CommandId, combo: string) => {
    const text = keyFault(id, combo, keys);
    setFault(text ? { id, text } : null);
    if (text) return;
    const { [id]: _, ...others } = keys;
    const isOwn = COMMANDS.find((command) => command.id === id)!.combo === combo;
    setPreferences({ keys: isOwn ? others : { ...others, [id]: combo } });
    setAsking(null);
  };
  return (
    <section className="key-settings" aria-labelledby="key-settings">
      <h3 id="key-settings">Keys of the detection page</h3>
      <ul>
        {COMMANDS.map(({ id, label, group }) => (
          <li key={id}>
            <span className="muted">{group}</span>
            <span>{label}</span>
            <Button
              size="small"
              active={asking === id}
              aria-label={`${label}: ${keyName(comboOf(id, keys))}, change`}
              aria-describedby={fault?.id === id ? 'key-fault' : undefined}
              onClick={() => {
                setFault(null);
                setAsking(id);
              }}
              onBlur={() => setAsking((old) => (old === id ? null : old))}
              onKeyDown={(event) => {
                if (asking !== id) return;
                if (event.key === 'Tab') return;
                event.preventDefault();
                event.stopPropagation();
                if (event.key === 'Escape') setAsking(null);
                else if (!['Shift', 'Control', 'Alt', 'Meta'].includes(event.key))
                  take(id, getKeyComboString(event.nativeEvent).replaceAll(' ', ''));
              }}
            >
              {asking === id ? 'press a key' : <kbd>{keyName(comboOf(id, keys))}</kbd>}
            </Button>
            {fault?.id === id && (
              <span id="key-fault" role="alert" className="key-settings__fault">
                {fault.text}
              </span>
            )}
          </li>
        ))}
      </ul>
      <Button
        size="small"
        text="Back to the keys as they were"
        disabled={Object.keys(keys).length === 0}
        onClick={() => setPreferences({ keys: {} })}
      />
    </section>
  );
}
