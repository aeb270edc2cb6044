import { field } from '@eremite/shared/contracts/field';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

/** Radii that are asked for, arcsec: one answer serves a whole range of zooms. */
const RADII = [600, 1800, 7200] as const;
/** The widest field there is, arcsec. */
export const WIDEST_FIELD = RADII[RADII.length - 1]!;

/** The radius to ask for to fill a view that reaches so far. */
export const fieldRadius = (reachArcsec: number): number =>
  RADII.find((radius) => radius >= reachArcsec) ?? WIDEST_FIELD;

/** All objects about a detection. A field may be large: it is let go soon after its detection is left. */
export const fieldQuery = (runId: string, detectionId: string, radiusArcsec: number) =>
  queryOptions({
    queryKey: ['run', runId, 'detection', detectionId, 'field', radiusArcsec],
    queryFn: ({ signal }) =>
      call(field, `/runs/${runId}/detections/${detectionId}/field?radiusArcsec=${radiusArcsec}`, { signal }),
    staleTime: Infinity,
    gcTime: 5000,
  });
