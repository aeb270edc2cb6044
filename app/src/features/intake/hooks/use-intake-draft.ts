import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useCallback, useEffect, useRef, useState } from 'react';
import { useSaveSettings } from '../api/intakes.ts';

const PAUSE_MS = 500;

/** The settings as they are being edited; each change is checked on the whole table a moment after it is made. */
export function useIntakeDraft(intake: Intake) {
  const [draft, setDraft] = useState<IntakeSettings>(intake.settings);
  const save = useSaveSettings(intake.id);
  const waiting = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  const { mutate } = save;
  const change = useCallback(
    (patch: Partial<IntakeSettings>) => {
      setDraft((old) => {
        const next = { ...old, ...patch };
        for (const key of Object.keys(next) as (keyof IntakeSettings)[]) if (next[key] === undefined) delete next[key];
        clearTimeout(waiting.current);
        waiting.current = setTimeout(() => mutate(next), PAUSE_MS);
        return next;
      });
    },
    [mutate],
  );
  useEffect(() => () => clearTimeout(waiting.current), []);
  return { draft, change, isChecking: save.isPending, error: save.error };
}

export type Change = ReturnType<typeof useIntakeDraft>['change'];
