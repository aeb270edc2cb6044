import { Button, FormGroup, TextArea } from '@blueprintjs/core';
import { useId, useRef, useState } from 'react';
import { footprintText } from './footprint-text.ts';
import { parseFootprint } from './parse-footprint.ts';
import { readMocFile } from './read-moc-file.ts';

const LABELS = { moc: 'The MOC', circles: 'The circles', polygons: 'The polygons' } as const;
const HELP = {
  moc: 'ASCII or JSON, as in 6/8032-8040 7/',
  circles: 'One a line: RA Dec radius, degrees',
  polygons: 'One corner a line: RA Dec, degrees; an empty line begins the next polygon',
} as const;
export type WrittenFootprint = keyof typeof HELP;

interface FootprintTextProps {
  type: WrittenFootprint;
  value: unknown;
  onChange: (value: unknown) => void;
}

/** A region written as text; a MOC may also come as a file. Taken over on leaving the field. */
export function FootprintText({ type, value, onChange }: FootprintTextProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [text, setText] = useState(footprintText(value));
  const [fault, setFault] = useState('');
  const read = () => {
    const result = parseFootprint(type, text);
    setFault('fault' in result ? result.fault : '');
    if ('value' in result && text !== footprintText(value)) onChange(result.value);
  };
  const load = async (file: File) => {
    const result = await readMocFile(file);
    setFault('fault' in result ? result.fault : '');
    if ('value' in result) {
      setText(typeof result.value === 'string' ? result.value : '');
      onChange(result.value);
    }
  };
  return (
    <FormGroup label={LABELS[type]} labelFor={id} helperText={fault || HELP[type]} intent={fault ? 'danger' : 'none'}>
      <TextArea
        id={id}
        fill
        rows={5}
        className="mono"
        value={text}
        onChange={(event) => setText(event.target.value)}
        onBlur={read}
      />
      {type === 'moc' && (
        <>
          <Button size="small" text="From a file (FITS, JSON or ASCII)" onClick={() => input.current?.click()} />
          <input
            ref={input}
            type="file"
            className="visually-hidden"
            tabIndex={-1}
            aria-label="MOC file"
            onChange={(event) => {
              const file = event.target.files?.[0];
              event.target.value = '';
              if (file) void load(file);
            }}
          />
        </>
      )}
    </FormGroup>
  );
}
