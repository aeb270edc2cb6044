import { Button, ProgressBar } from '@blueprintjs/core';
import { useRef, useState } from 'react';
import { useAddObservation } from '../api/observations.ts';

interface AddObservationsProps {
  detectionId: string;
  /** What is asked for, in words. */
  what: string;
  accept: string;
}

interface Progress {
  done: number;
  all: number;
  faults: { fileName: string; message: string }[];
}

/** Sends files one after the other; what is wrong with one is said of that one and holds up no other. */
export function AddObservations({ detectionId, what, accept }: AddObservationsProps) {
  const input = useRef<HTMLInputElement>(null);
  const add = useAddObservation(detectionId);
  const [progress, setProgress] = useState<Progress | null>(null);
  const send = async (files: readonly File[]) => {
    const faults: Progress['faults'] = [];
    for (const [i, file] of files.entries()) {
      setProgress({ done: i, all: files.length, faults: [...faults] });
      try {
        await add.mutateAsync({ file });
      } catch (error) {
        faults.push({ fileName: file.name, message: error instanceof Error ? error.message : String(error) });
      }
    }
    setProgress({ done: files.length, all: files.length, faults });
  };
  const isBusy = progress !== null && progress.done < progress.all;
  return (
    <div className="stack">
      <div className="row">
        <input
          ref={input}
          type="file"
          hidden
          multiple
          accept={accept}
          aria-label={`Files to add: ${what}`}
          onChange={(event) => {
            const files = [...(event.target.files ?? [])];
            event.target.value = '';
            if (files.length > 0) void send(files);
          }}
        />
        <Button size="small" text={`Add ${what}`} loading={isBusy} onClick={() => input.current?.click()} />
        {isBusy && (
          <>
            <ProgressBar value={progress.done / progress.all} animate={false} />
            <span className="num small" role="status">
              {progress.done} of {progress.all}
            </span>
          </>
        )}
      </div>
      {progress && progress.faults.length > 0 && (
        <ul className="small add-faults" role="alert">
          {progress.faults.map(({ fileName, message }) => (
            <li key={fileName}>
              <span className="mono">{fileName}</span>: {message}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
