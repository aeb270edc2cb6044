import { shortlistProposal, type ShortlistRule } from '@eremite/shared/contracts/shortlist';
import { useMutation } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** What a rule would pick; nothing is changed by asking. */
export const usePropose = (surveyId: string) =>
  useMutation({
    mutationFn: (rule: Partial<ShortlistRule> & { runId: string }) =>
      call(shortlistProposal, `/surveys/${surveyId}/shortlist/proposals`, { method: 'POST', json: rule }),
  });
