import type { SurveyEvent } from '@eremite/shared/contracts/survey-event';
import { useEffect, useState } from 'react';

const listeners = new Set<(event: SurveyEvent) => void>();

/** Passes on what someone else has just done. */
export function tell(event: SurveyEvent): void {
  listeners.forEach((listener) => listener(event));
}

/** What someone else did last on a detection while it stands on the page; null until something happens. */
export function useOthersEvent(detectionId: string): SurveyEvent | null {
  const [last, setLast] = useState<SurveyEvent | null>(null);
  useEffect(() => {
    const listener = (event: SurveyEvent) => {
      if (event.detectionId === detectionId) setLast(event);
    };
    listeners.add(listener);
    return () => {
      listeners.delete(listener);
    };
  }, [detectionId]);
  return last?.detectionId === detectionId ? last : null;
}
