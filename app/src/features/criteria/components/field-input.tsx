import { HTMLSelect, InputGroup, Switch } from '@blueprintjs/core';
import { useState } from 'react';
import { valueText, type CriteriaField } from '#lib/criteria/criteria-fields.ts';

interface FieldInputProps {
  id: string;
  field: CriteriaField;
  value: unknown;
  invalid: boolean;
  onChange: (value: unknown) => void;
}

const listOf = (text: string) =>
  text
    .split(',')
    .map((part) => part.trim())
    .filter(Boolean);

/** Lines such as `1400-1401 radar` become bands. */
const bandsOf = (text: string) =>
  listOf(text).map((part) => {
    const [, low, high, name] = /^([\d.]+)\s*[-–]\s*([\d.]+)\s*(.*)$/.exec(part) ?? [];
    return { lowMhz: Number(low), highMhz: Number(high), name: name ?? '' };
  });

/** Text of the field to its value; what cannot be read stays as it is and is refused by the contract. */
function read(field: CriteriaField, text: string): unknown {
  if (field.kind === 'bands') return bandsOf(text);
  if (field.kind === 'words') return listOf(text);
  if (field.kind === 'numbers') return listOf(text).map(Number);
  if (text.trim() === '') return field.optional ? null : undefined;
  return Number(text);
}

/** The control that fits the kind of the value. */
export function FieldInput({ id, field, value, invalid, onChange }: FieldInputProps) {
  const [text, setText] = useState(() =>
    value === null || (Array.isArray(value) && value.length === 0) ? '' : valueText(field, value),
  );
  if (field.kind === 'switch') {
    return (
      <Switch
        id={id}
        checked={value === true}
        label={value === true ? 'on' : 'off'}
        onChange={(event) => onChange(event.target.checked)}
      />
    );
  }
  if (field.kind === 'choice') {
    return (
      <HTMLSelect
        id={id}
        fill
        value={String(value)}
        options={field.choices}
        onChange={(event) => onChange(event.target.value)}
      />
    );
  }
  return (
    <InputGroup
      id={id}
      className="mono"
      intent={invalid ? 'danger' : 'none'}
      aria-invalid={invalid}
      inputMode={field.kind === 'number' ? 'decimal' : 'text'}
      placeholder={field.optional ? 'not set' : field.kind === 'bands' ? '1400-1401 radar, …' : ''}
      value={text}
      onValueChange={(next) => {
        setText(next);
        onChange(read(field, next));
      }}
    />
  );
}
