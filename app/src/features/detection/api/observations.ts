import { listOf } from '@eremite/shared/contracts/list';
import {
  MOST_RASTER_PIXELS,
  observation,
  spectrumChannels,
  type ObservationFields,
} from '@eremite/shared/contracts/observation';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { Raster } from '#components/sky-image/paint-raster.ts';
import { act, call, request } from '#lib/api-client.ts';

const keyOf = (detectionId: string) => ['detection', detectionId, 'observations'];

/** Images and spectra of a detection. */
export const observationsQuery = (detectionId: string) =>
  queryOptions({
    queryKey: keyOf(detectionId),
    queryFn: ({ signal }) => call(listOf(observation), `/detections/${detectionId}/observations`, { signal }),
  });

/** Values of an image about its detection. Files never change; a large raster is let go soon after it was left. */
export const rasterQuery = (id: string, halfArcsec: number, wantedPixels: number) => {
  const pixels = Math.max(8, Math.min(MOST_RASTER_PIXELS, Math.round(wantedPixels)));
  return queryOptions({
    queryKey: ['observation', id, 'raster', halfArcsec, pixels],
    queryFn: async ({ signal }): Promise<Raster> => {
      const path = `/observations/${id}/raster?halfArcsec=${halfArcsec}&pixels=${pixels}`;
      const answer = await request(path, { signal, headers: { accept: 'application/octet-stream' } });
      return { values: new Float32Array(await answer.arrayBuffer()), pixels, halfArcsec };
    },
    staleTime: Infinity,
    gcTime: 30_000,
  });
};

export const channelsQuery = (id: string) =>
  queryOptions({
    queryKey: ['observation', id, 'channels'],
    queryFn: ({ signal }) => call(spectrumChannels, `/observations/${id}/channels`, { signal }),
    staleTime: Infinity,
  });

/** Adds a file to a detection. */
export function useAddObservation(detectionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ file, fields = {} }: { file: File; fields?: Partial<ObservationFields> }) => {
      const form = new FormData();
      for (const [name, value] of Object.entries(fields)) if (value) form.append(name, value);
      form.append('file', file);
      return call(observation, `/detections/${detectionId}/observations`, { method: 'POST', form });
    },
    onSettled: () => client.invalidateQueries({ queryKey: keyOf(detectionId) }),
  });
}

export function useRemoveObservation(detectionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => act(`/observations/${id}`, { method: 'DELETE' }),
    onSettled: () => client.invalidateQueries({ queryKey: keyOf(detectionId) }),
  });
}
