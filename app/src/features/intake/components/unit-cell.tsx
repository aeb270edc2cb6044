import { InputGroup } from '@blueprintjs/core';
import { useState } from 'react';

interface UnitCellProps {
  column: string;
  /** Unit the file states, if any. */
  stated: string | null;
  /** Unit given by a person, which goes before the file's. */
  given: string | undefined;
  onChange: (unit: string | undefined) => void;
}

/** The unit of a column with a role: the file's, or another put in its place. Taken over on leaving the field or Enter. */
export function UnitCell({ column, stated, given, onChange }: UnitCellProps) {
  const [text, setText] = useState(given ?? '');
  const take = () => {
    const unit = text.trim() || undefined;
    if (unit !== given) onChange(unit);
  };
  return (
    <InputGroup
      small
      className="column-roles__unit mono"
      aria-label={`Unit of ${column}`}
      maxLength={60}
      placeholder={stated ?? 'not stated'}
      value={text}
      onValueChange={setText}
      onBlur={take}
      onKeyDown={(event) => event.key === 'Enter' && take()}
    />
  );
}
