import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { useQuery } from '@tanstack/react-query';
import { entriesOf, shortlistQuery, useSaveShortlist } from '#lib/queries/shortlist.ts';
import { complain, say } from '#lib/toaster.ts';

/** Whether the detection is on the survey's shortlist, and a way to put it there or take it off. */
export function useShortlisting(surveyId: string, detail: VerdictDetail) {
  const { data: list } = useQuery(shortlistQuery(surveyId));
  const save = useSaveShortlist(surveyId);
  const { detectionId, name } = detail.verdict;
  const isOn = list?.entries.some((entry) => entry.detectionId === detectionId) ?? false;
  const toggle = () => {
    if (!list) return;
    const entries = entriesOf(list).filter((entry) => entry.detectionId !== detectionId);
    if (!isOn) entries.push({ detectionId, reason: '', nullResult: '' });
    save.mutate(
      { runId: list.runId ?? detail.runId, entries, version: list.version },
      {
        onSuccess: () => void say(isOn ? `${name} is off the shortlist.` : `${name} is on the shortlist.`),
        onError: (error) => void complain(error),
      },
    );
  };
  return { isOn, toggle, isPending: save.isPending || !list };
}
