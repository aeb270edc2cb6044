import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useCallback, useEffect, useRef, useState } from 'react';
import { useSaveSettings } from '../api/intakes.ts';

const PAUSE_MS = 500;

/**
 * The settings as they are being edited; each change is checked on the whole table a moment after it is made.
 * `isChecking` holds from the change on, so that nothing is published under settings that are no longer shown.
 */
export function useIntakeDraft(intake: Intake, supersedes?: string) {
  const [draft, setDraft] = useState<IntakeSettings>(intake.settings);
  const [isWaiting, setWaiting] = useState(false);
  const save = useSaveSettings(intake.id);
  const latest = useRef(draft);
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  const { mutate } = save;
  const send = useCallback(() => {
    clearTimeout(timer.current);
    timer.current = undefined;
    setWaiting(false);
    mutate(latest.current, {
      onSuccess: ({ settings }) => {
        // A region sent as a FITS file comes back as text, and need not be sent again with every change.
        const { value } = latest.current.footprint ?? {};
        if (typeof value !== 'object' || value === null || !('fits' in value)) return;
        latest.current = { ...latest.current, footprint: settings.footprint };
        setDraft(latest.current);
      },
    });
  }, [mutate]);
  const change = useCallback(
    (patch: Partial<IntakeSettings>) => {
      const next = { ...latest.current, ...patch };
      for (const key of Object.keys(next) as (keyof IntakeSettings)[]) if (next[key] === undefined) delete next[key];
      latest.current = next;
      setDraft(next);
      setWaiting(true);
      clearTimeout(timer.current);
      timer.current = setTimeout(send, PAUSE_MS);
    },
    [send],
  );
  // Said once by the page that led here; from then on it is a setting like any other.
  const told = useRef(supersedes);
  useEffect(() => {
    if (told.current !== undefined && latest.current.supersedes === undefined) change({ supersedes: told.current });
    told.current = undefined;
  }, [change]);
  // Leaving the page a moment after a change must not lose it.
  useEffect(
    () => () => {
      if (timer.current !== undefined) send();
    },
    [send],
  );
  return { draft, change, isChecking: isWaiting || save.isPending, error: save.error };
}

export type Change = ReturnType<typeof useIntakeDraft>['change'];
