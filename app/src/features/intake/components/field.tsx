import { FormGroup, HTMLSelect, InputGroup } from '@blueprintjs/core';
import { useId, useState } from 'react';

interface ChoiceFieldProps<T extends string> {
  label: string;
  /** Which setting it is, so that a question can lead to it. */
  pointer?: string;
  help?: string;
  value: T | undefined;
  choices: Record<T, string>;
  /** Words of the entry that leaves it unsaid. */
  unsaid?: string;
  onChange: (value: T | undefined) => void;
}

/** One of a few; may be left unsaid, which is then stated as an assumption. */
export function ChoiceField<T extends string>({
  label,
  pointer,
  help,
  value,
  choices,
  unsaid = 'not stated',
  onChange,
}: ChoiceFieldProps<T>) {
  const id = useId();
  return (
    <div data-pointer={pointer}>
      <FormGroup label={label} labelFor={id} helperText={help}>
        <HTMLSelect
          id={id}
          fill
          value={value ?? ''}
          onChange={(event) => onChange((event.target.value || undefined) as T | undefined)}
        >
          <option value="">{unsaid}</option>
          {(Object.entries(choices) as [T, string][]).map(([key, words]) => (
            <option key={key} value={key}>
              {words}
            </option>
          ))}
        </HTMLSelect>
      </FormGroup>
    </div>
  );
}

interface NumberFieldProps {
  label: string;
  pointer?: string;
  unit?: string;
  help?: string;
  value: number | null | undefined;
  min?: number;
  max?: number;
  onChange: (value: number | undefined) => void;
}

/** A number that may be absent. What cannot be read as a number is not sent. */
export function NumberField({ label, pointer, unit, help, value, min, max, onChange }: NumberFieldProps) {
  const id = useId();
  const [typed, setText] = useState(value === null || value === undefined ? '' : String(value));
  // A value set from elsewhere, as a suggested depth, takes the place of what was typed.
  const text = value != null && Number(typed) !== value ? String(value) : typed;
  return (
    <div data-pointer={pointer}>
      <FormGroup label={label} labelInfo={unit} labelFor={id} helperText={help}>
        <InputGroup
          id={id}
          type="number"
          step="any"
          {...(min === undefined ? {} : { min })}
          {...(max === undefined ? {} : { max })}
          value={text}
          onValueChange={(next) => {
            setText(next);
            const number = Number(next);
            if (next === '') onChange(undefined);
            else if (Number.isFinite(number)) onChange(number);
          }}
        />
      </FormGroup>
    </div>
  );
}

interface TextFieldProps {
  label: string;
  /** Which setting it is, so that a question can lead to it. */
  pointer?: string;
  help?: string;
  value: string | undefined;
  onChange: (value: string) => void;
}

export function TextField({ label, pointer, help, value, onChange }: TextFieldProps) {
  const id = useId();
  const [text, setText] = useState(value ?? '');
  return (
    <div data-pointer={pointer}>
      <FormGroup label={label} labelFor={id} helperText={help}>
        <InputGroup
          id={id}
          value={text}
          onValueChange={(next) => {
            setText(next);
            onChange(next);
          }}
        />
      </FormGroup>
    </div>
  );
}
