import { useMutation, useQueryClient } from '@tanstack/react-query';
import { act } from '#lib/api-client.ts';

export function useAssign(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: { detectionIds: string[]; userId: string }) =>
      act(`/surveys/${surveyId}/assignments`, { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['survey', surveyId, 'docket'] }),
  });
}
