import { surveyEvent, type SurveyEvent } from '@eremite/shared/contracts/survey-event';
import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { API_BASE } from '#config/paths.ts';
import { tell } from './latest-event.ts';

/** Answers that hang on one detection only. */
function concerns(queryKey: readonly unknown[], { detectionId }: SurveyEvent): boolean {
  if (queryKey[0] === 'detection') return queryKey[1] === detectionId;
  return queryKey[0] === 'run' && queryKey[2] === 'detection' && queryKey[3] === detectionId;
}

function askAnew(client: QueryClient, surveyId: string, events: readonly SurveyEvent[]): void {
  const runEnded = events.some(({ action }) => action === 'finished a run');
  const isList = ({ queryKey }: { queryKey: readonly unknown[] }): boolean =>
    (queryKey[0] === 'survey' && queryKey[1] === surveyId) || (queryKey[0] === 'run' && queryKey[2] === 'verdicts');
  void client.invalidateQueries({
    predicate: ({ queryKey }) =>
      runEnded ? queryKey[0] === 'detection' : events.some((event) => concerns(queryKey, event)),
  });
  // What one does oneself is on the page already; the long lists are asked for when others did something.
  void client.invalidateQueries({
    predicate: isList,
    refetchType: events.every(({ mine }) => mine) ? 'none' : 'active',
  });
}

/** Together within this time, so that a bulk of work is asked for once. */
const GATHER_MS = 400;

/** What others finish in the survey appears without reload. */
export function useSurveyEvents(surveyId: string): void {
  const client = useQueryClient();
  useEffect(() => {
    let source: EventSource | undefined;
    let last = '';
    let gathered: SurveyEvent[] = [];
    let timer: ReturnType<typeof setTimeout> | undefined;
    const open = () => {
      if (source || document.hidden) return;
      source = new EventSource(`${API_BASE}/surveys/${surveyId}/events${last && `?after=${last}`}`);
      source.addEventListener('ready', (message: MessageEvent<string>) => (last = message.lastEventId));
      source.addEventListener('done', (message: MessageEvent<string>) => {
        last = message.lastEventId;
        const read = surveyEvent.safeParse(JSON.parse(message.data));
        if (!read.success) return;
        gathered.push(read.data);
        clearTimeout(timer);
        timer = setTimeout(() => {
          askAnew(client, surveyId, gathered);
          gathered.filter(({ mine }) => !mine).forEach(tell);
          gathered = [];
        }, GATHER_MS);
      });
    };
    const close = () => {
      source?.close();
      source = undefined;
    };
    // A browser keeps few connections to one host: pages nobody looks at give theirs up and catch up later.
    const turn = () => (document.hidden ? close() : open());
    open();
    document.addEventListener('visibilitychange', turn);
    return () => {
      clearTimeout(timer);
      document.removeEventListener('visibilitychange', turn);
      close();
    };
  }, [client, surveyId]);
}
