import { InputGroup } from '@blueprintjs/core';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { useState } from 'react';
import { scaleWords } from '../hooks/scale-words.ts';

interface ScaleNoteProps {
  settings: CriteriaSettings;
  h0: number;
  /** Distance and search radius of what is previewed, where known. */
  typicalMpc: number | undefined;
  typicalArcsec: number | undefined;
}

/** Angles in kpc and back at a distance of one's choice, so that a radius can be judged while it is being set. */
export function ScaleNote({ settings, h0, typicalMpc, typicalArcsec }: ScaleNoteProps) {
  const [typed, setTyped] = useState('');
  const distance = Number(typed || (typicalMpc ?? 50).toFixed(0));
  const search = settings.position.searchRadiusArcsec ?? typicalArcsec;
  return (
    <div className="scale-note">
      <label>
        At{' '}
        <InputGroup
          className="mono"
          inputMode="decimal"
          size="small"
          aria-label="Distance in Mpc"
          placeholder={distance > 0 ? distance.toFixed(0) : ''}
          value={typed}
          onValueChange={setTyped}
        />{' '}
        Mpc
      </label>
      {distance > 0 && distance < Infinity ? (
        <ul>
          {scaleWords(settings, distance, search, h0).map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      ) : (
        <p className="muted">Give a distance above zero.</p>
      )}
    </div>
  );
}
