import { listOf } from '@eremite/shared/contracts/list';
import { survey, type UpdateSurveyRequest } from '@eremite/shared/contracts/survey';
import { queryOptions, useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { act, call, request } from '#lib/api-client.ts';
import { surveyQuery } from '#lib/queries/survey.ts';

/** A survey with the tag of what a change could overwrite. */
export const editedSurveyQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'edited'],
    queryFn: async ({ signal }) => {
      const answer = await request(`/surveys/${surveyId}`, { signal });
      return { survey: survey.parse(await answer.json()), etag: answer.headers.get('etag') ?? '*' };
    },
    // What is being edited must not change under the hands; a change by others shows when one saves.
    refetchOnWindowFocus: false,
  });

export const deletedSurveysQuery = () =>
  queryOptions({
    queryKey: ['surveys', 'deleted'],
    queryFn: ({ signal }) => call(listOf(survey), '/surveys?deleted=true&limit=500', { signal }),
  });

const renew = (client: QueryClient, surveyId: string) =>
  Promise.all([
    client.invalidateQueries({ queryKey: ['surveys'] }),
    client.invalidateQueries({ queryKey: surveyQuery(surveyId).queryKey }),
  ]);

/** Refused with 412 where someone else changed the survey since `etag` was read. */
export function useUpdateSurvey(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ etag, ...json }: UpdateSurveyRequest & { etag: string }) =>
      call(survey, `/surveys/${surveyId}`, { method: 'PATCH', json, headers: { 'if-match': etag } }),
    onSuccess: () => renew(client, surveyId),
  });
}

export function useDeleteSurvey() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (surveyId: string) => act(`/surveys/${surveyId}`, { method: 'DELETE' }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['surveys'] }),
  });
}

export function useRestoreSurvey() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (surveyId: string) => call(survey, `/surveys/${surveyId}/restore`, { method: 'POST' }),
    onSuccess: (_, surveyId) => renew(client, surveyId),
  });
}
