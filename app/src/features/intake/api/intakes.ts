import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { intake, type Intake } from '@eremite/shared/contracts/intake';
import { jobAccepted } from '@eremite/shared/contracts/job';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';

export const intakesQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'intakes'],
    queryFn: ({ signal }) => call(listOf(intake), `/surveys/${surveyId}/intakes`, { signal }),
  });

export const intakeQuery = (intakeId: string) =>
  queryOptions({
    queryKey: ['intake', intakeId],
    queryFn: ({ signal }) => call(intake, `/intakes/${intakeId}`, { signal }),
  });

export interface Upload {
  files: readonly File[];
  readMe?: File | undefined;
}

export function useUpload(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    /** One table, or several files of one; with the ReadMe of a journal's data file. */
    mutationFn: ({ files, readMe }: Upload) => {
      const form = new FormData();
      if (readMe) form.append('readMe', readMe, readMe.name);
      for (const file of files) form.append('file', file, file.name);
      return call(intake, `/surveys/${surveyId}/intakes`, { method: 'POST', form });
    },
    onSuccess: (made) => {
      client.setQueryData(intakeQuery(made.id).queryKey, made);
      return client.invalidateQueries({ queryKey: intakesQuery(surveyId).queryKey });
    },
  });
}

/** New settings; the answer says what would become of the rows under them. */
export function useSaveSettings(intakeId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationKey: ['intake', intakeId, 'settings'],
    scope: { id: `intake-${intakeId}` },
    mutationFn: (settings: IntakeSettings) =>
      call(intake, `/intakes/${intakeId}`, { method: 'PATCH', json: { settings } }),
    onSuccess: (answer: Intake) => client.setQueryData(intakeQuery(intakeId).queryKey, answer),
  });
}

/** Further files of the same catalogue. */
export function useAddParts(intakeId: string) {
  const client = useQueryClient();
  return useMutation({
    scope: { id: `intake-${intakeId}` },
    mutationFn: (files: readonly File[]) => {
      const form = new FormData();
      for (const file of files) form.append('file', file, file.name);
      return call(intake, `/intakes/${intakeId}/parts`, { method: 'POST', form });
    },
    onSuccess: (answer: Intake) => client.setQueryData(intakeQuery(intakeId).queryKey, answer),
  });
}

/** Takes a file out again, by its number; the first file is 0 and stays. */
export function useRemovePart(intakeId: string) {
  const client = useQueryClient();
  return useMutation({
    scope: { id: `intake-${intakeId}` },
    mutationFn: (part: number) => call(intake, `/intakes/${intakeId}/parts/${part}`, { method: 'DELETE' }),
    onSuccess: (answer: Intake) => client.setQueryData(intakeQuery(intakeId).queryKey, answer),
  });
}

export const usePublish = (intakeId: string) =>
  useMutation({ mutationFn: () => call(jobAccepted, `/intakes/${intakeId}/publish`, { method: 'POST' }) });

export function useDiscard(surveyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (intakeId: string) => act(`/intakes/${intakeId}`, { method: 'DELETE' }),
    onSuccess: () => client.invalidateQueries({ queryKey: intakesQuery(surveyId).queryKey }),
  });
}
