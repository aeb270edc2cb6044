import { Button } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useRef } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { count } from '#lib/format/number.ts';
import { fileSize } from '#lib/format/time.ts';
import { useAddParts, useRemovePart } from '../api/intakes.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { NumberField } from './field.tsx';

interface PartsFieldsProps {
  intake: Intake;
  draft: IntakeSettings;
  change: Change;
  isSettled: boolean;
}

/** The files of a catalogue that comes in several: tiles, strips, cones. */
export function PartsFields({ intake, draft, change, isSettled }: PartsFieldsProps) {
  const input = useRef<HTMLInputElement>(null);
  const add = useAddParts(intake.id);
  const remove = useRemovePart(intake.id);
  const isBusy = add.isPending || remove.isPending;
  return (
    <div className="stack" data-pointer="/parts">
      {intake.parts.length > 0 && (
        <ul className="plain-list parts" aria-label="Files of this catalogue">
          {intake.parts.map(({ fileName, bytes, firstRow, rows }, part) => (
            <li key={`${fileName} ${firstRow} ${part}`} className="row">
              <span className="mono">{fileName}</span>
              <span className="num muted small grow">
                {count(rows)} rows{rows > 0 && `, numbered from ${count(firstRow)}`}
                {bytes !== null && `, ${fileSize(bytes)}`}
              </span>
              {part > 0 && (
                <Button
                  size="small"
                  variant="minimal"
                  text="Take out"
                  aria-label={`Take out ${fileName}`}
                  disabled={isBusy || !isSettled}
                  onClick={() => remove.mutate(part)}
                />
              )}
            </li>
          ))}
        </ul>
      )}
      <div className="row">
        <Button
          size="small"
          text="Add files of the same catalogue"
          loading={add.isPending}
          disabled={isBusy || !isSettled}
          onClick={() => input.current?.click()}
        />
        <span className="muted small grow">
          Tiles, strips or cones with the same columns; rows they share are found.
        </span>
        <input
          ref={input}
          type="file"
          multiple
          className="visually-hidden"
          tabIndex={-1}
          aria-label="Further files of the catalogue"
          onChange={(event) => {
            const files = [...(event.target.files ?? [])];
            event.target.value = '';
            if (files.length > 0) add.mutate(files);
          }}
        />
      </div>
      <ProblemCallout error={add.error ?? remove.error} title="That file was not added" />
      {intake.parts.length > 0 && draft.kind !== 'hi' && (
        <div className="columns field-grid">
          <NumberField
            label="One object within"
            pointer="/overlapArcsec"
            unit="arcsec"
            help="Rows of different files this near are one object: the earlier file's is kept. 0 keeps all; 0.5 where left empty."
            value={draft.overlapArcsec}
            min={0}
            max={60}
            onChange={(overlapArcsec) => change({ overlapArcsec })}
          />
        </div>
      )}
    </div>
  );
}
