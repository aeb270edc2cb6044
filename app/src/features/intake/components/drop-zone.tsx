import { Button, Dialog, DialogBody, DialogFooter } from '@blueprintjs/core';
import { useRef, useState, type DragEvent } from 'react';
import type { Upload } from '../api/intakes.ts';

interface DropZoneProps {
  isPending: boolean;
  /** One upload, or one for each of several tables. */
  onUploads: (uploads: Upload[]) => void;
}

const isReadMe = ({ name }: File) => /^readme(\.(txt|md))?$/i.test(name);

/** Where a table is dropped, or chosen by those who would rather not drag. Several files are asked about. */
export function DropZone({ isPending, onUploads }: DropZoneProps) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const [several, setSeveral] = useState<Upload>();
  const take = (all: File[]) => {
    const data = all.filter((file) => !isReadMe(file));
    const readMe = data.length > 0 ? all.find(isReadMe) : undefined;
    const upload = { files: data.length > 0 ? data : all.slice(0, 1), readMe };
    if (upload.files.length > 1) setSeveral(upload);
    else if (upload.files.length === 1) onUploads([upload]);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    take([...event.dataTransfer.files]);
  };
  const settle = (uploads: Upload[]) => {
    setSeveral(undefined);
    onUploads(uploads);
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
        CSV, TSV, text, ECSV, VOTable, FITS, machine-readable and IPAC tables, also gzipped. It is read, its columns are
        guessed, and nothing is published before you say so. Drop a journal’s data file together with its ReadMe, and
        the tiles, strips or cones of one catalogue together.
      </p>
      <Button intent="primary" text="Choose files" loading={isPending} onClick={() => input.current?.click()} />
      <input
        ref={input}
        type="file"
        multiple
        className="visually-hidden"
        tabIndex={-1}
        aria-label="Table file"
        onChange={(event) => {
          const files = [...(event.target.files ?? [])];
          event.target.value = '';
          take(files);
        }}
      />
      <Dialog
        isOpen={several !== undefined}
        title={`${several?.files.length ?? 0} files`}
        onClose={() => setSeveral(undefined)}
        style={{ width: 'min(540px, 92vw)' }}
      >
        <DialogBody>
          <ul className="plain-list mono small drop-zone__files">
            {several?.files.map((file, at) => (
              <li key={`${file.name} ${at}`}>{file.name}</li>
            ))}
          </ul>
          <p>
            Are they parts of one catalogue (tiles, strips, cones with the same columns), or tables each for itself?
          </p>
        </DialogBody>
        <DialogFooter
          actions={
            <>
              <Button
                text="Tables each for itself"
                onClick={() =>
                  settle((several?.files ?? []).map((file) => ({ files: [file], readMe: several?.readMe })))
                }
              />
              <Button intent="primary" text="Parts of one catalogue" onClick={() => several && settle([several])} />
            </>
          }
        />
      </Dialog>
    </div>
  );
}
