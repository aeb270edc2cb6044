import { team } from '@eremite/shared/contracts/auth';
import { listOf } from '@eremite/shared/contracts/list';
import type { createSurveyRequest } from '@eremite/shared/contracts/survey';
import { survey } from '@eremite/shared/contracts/survey';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { call } from '#lib/api-client.ts';

export const surveysQuery = () =>
  queryOptions({
    queryKey: ['surveys'],
    queryFn: ({ signal }) => call(listOf(survey), '/surveys?limit=500', { signal }),
  });

export const teamsQuery = () =>
  queryOptions({
    queryKey: ['teams'],
    queryFn: ({ signal }) => call(listOf(team), '/teams?limit=500', { signal }),
  });

export function useCreateSurvey() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (json: z.input<typeof createSurveyRequest>) => call(survey, '/surveys', { method: 'POST', json }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['surveys'] }),
  });
}
