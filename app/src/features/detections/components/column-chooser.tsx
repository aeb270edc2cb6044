import { Button, Checkbox, Popover } from '@blueprintjs/core';
import type { ReactNode } from 'react';

interface ColumnChooserProps {
  columns: readonly { key: string; header: ReactNode }[];
  chosen: readonly string[];
  onChange: (keys: string[]) => void;
  onReset: () => void;
}

export function ColumnChooser({ columns, chosen, onChange, onReset }: ColumnChooserProps) {
  const toggle = (key: string) =>
    onChange(columns.map((column) => column.key).filter((k) => (k === key ? !chosen.includes(k) : chosen.includes(k))));
  return (
    <Popover
      placement="bottom-end"
      minimal
      content={
        <div style={{ padding: 14, columns: 2, columnGap: 24 }} role="group" aria-label="Columns">
          {columns.map(({ key, header }) => (
            <Checkbox key={key} checked={chosen.includes(key)} onChange={() => toggle(key)}>
              {header}
            </Checkbox>
          ))}
          <Button size="small" variant="minimal" text="As it was" onClick={onReset} />
        </div>
      }
    >
      <Button text="Columns" />
    </Popover>
  );
}
