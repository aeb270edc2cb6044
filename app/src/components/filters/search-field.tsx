import { InputGroup } from '@blueprintjs/core';
import { useEffect, useState } from 'react';

interface SearchFieldProps {
  label: string;
  value: string;
  onChange: (value: string) => void;
}

/** Text to look for; tells the page a moment after the typing stops. */
export function SearchField({ label, value, onChange }: SearchFieldProps) {
  const [text, setText] = useState(value);
  const [seen, setSeen] = useState(value);
  if (value !== seen) {
    setSeen(value);
    setText(value);
  }
  useEffect(() => {
    if (text === value) return;
    const timer = setTimeout(() => onChange(text), 250);
    return () => clearTimeout(timer);
  }, [text, value, onChange]);
  return <InputGroup type="search" aria-label={label} placeholder={label} value={text} onValueChange={setText} />;
}
