import { useRef, useState, type DragEvent } from 'react';
import { Button } from '@blueprintjs/core';

interface DropZoneProps {
  isPending: boolean;
  onFile: (file: File) => void;
}

/** Where a table is dropped, or chosen by those who would rather not drag. */
export function DropZone({ isPending, onFile }: DropZoneProps) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const file = event.dataTransfer.files[0];
    if (file) onFile(file);
  };
  return (
    <div
      className={`drop-zone${over ? ' drop-zone--over' : ''}`}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      <h2>{isPending ? 'Reading the table…' : 'Drop a table here'}</h2>
      <p className="muted">
        CSV, TSV, VOTable and the other formats of the trade, also gzipped. It is read, its columns are guessed, and
        nothing is published before you say so.
      </p>
      <Button intent="primary" text="Choose a file" loading={isPending} onClick={() => input.current?.click()} />
      <input
        ref={input}
        type="file"
        className="visually-hidden"
        tabIndex={-1}
        aria-label="Table file"
        onChange={(event) => {
          const file = event.target.files?.[0];
          event.target.value = '';
          if (file) onFile(file);
        }}
      />
    </div>
  );
}
