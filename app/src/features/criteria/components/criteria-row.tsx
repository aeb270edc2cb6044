import { Button } from '@blueprintjs/core';
import { useState } from 'react';
import { isStandard, valueText, type CriteriaField } from '#lib/criteria/criteria-fields.ts';
import { FieldInput } from './field-input.tsx';

interface CriteriaRowProps {
  field: CriteriaField;
  value: unknown;
  fault: string | undefined;
  /** Absent for reading only. */
  onChange?: (value: unknown) => void;
}

/** One criterion: its name and unit, its value, whether it is the default, what it does and where it comes from. */
export function CriteriaRow({ field, value, fault, onChange }: CriteriaRowProps) {
  const id = `${field.section}-${field.key}`;
  const standard = isStandard(field, value);
  const [resets, setResets] = useState(0);
  const reset = () => {
    onChange?.(field.standard);
    setResets(resets + 1);
  };
  return (
    <div className={`criteria-row${standard ? '' : ' criteria-row--changed'}`}>
      <div>
        <label htmlFor={onChange ? id : undefined}>{field.title}</label>
        {field.unit && <span className="criteria-row__unit mono">{field.unit}</span>}
      </div>
      <div>
        {onChange ? (
          <FieldInput
            key={resets}
            id={id}
            field={field}
            value={value}
            invalid={fault !== undefined}
            onChange={onChange}
          />
        ) : (
          <span className={field.kind === 'choice' ? undefined : 'mono'}>{valueText(field, value)}</span>
        )}
        {fault && <p className="criteria-row__fault">{fault}</p>}
        <p className="criteria-row__standard">
          {standard ? 'default' : <>default {valueText(field, field.standard)}</>}
          {!standard && onChange && <Button size="small" variant="minimal" text="reset" onClick={reset} />}
        </p>
      </div>
      <div className="criteria-row__text">
        {field.description}
        <span className="muted"> {field.source}</span>
      </div>
    </div>
  );
}
