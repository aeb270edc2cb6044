import type { Observation } from '@eremite/shared/contracts/observation';
import { ARCSEC_PER_RAD } from '@eremite/shared/drawing/panel-plane';
import { DEGREE } from '@eremite/shared/science/constants';
import { separation } from '@eremite/shared/science/sky/separation';
import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import { setImageSettings, useImageSettings } from '#components/sky-image/image-settings.ts';
import type { Look } from '#components/sky-image/paint-raster.ts';
import type { Backdrop } from '#components/sky-map/use-image-layer.ts';
import { usePreferences } from '#lib/preferences.ts';
import { observationsQuery, rasterQuery } from '../api/observations.ts';

const BLINK_MS = 900;
/** Beyond this nothing is asked for, arcsec. */
const WIDEST = 14_400;

export type ImageObservation = Observation & { image: NonNullable<Observation['image']> };
const isImage = (item: Observation): item is ImageObservation => item.image !== null;

/** The images among what there is, the one with the finest pixels first. */
export const finestFirst = (items: readonly Observation[]): ImageObservation[] =>
  items.filter(isImage).sort((a, b) => a.image.pixelArcsec - b.image.pixelArcsec);

/** How far the image reaches from the detection, arcsec. */
export function reachOf({ image }: ImageObservation, centre: { raDeg: number; decDeg: number }): number {
  const [lon1, lat1, lon2, lat2] = [image.raDeg, image.decDeg, centre.raDeg, centre.decDeg].map((d) => d * DEGREE);
  return image.reachArcsec + separation(lon1!, lat1!, lon2!, lat2!) * ARCSEC_PER_RAD;
}

/** How images are painted, by the settings and the theme. */
export function useLook(): Look {
  const { stretch, colours, isInverse, percent } = useImageSettings();
  const { theme } = usePreferences();
  const inverse = isInverse ?? (colours === 'grey' && theme === 'light');
  return useMemo(() => ({ stretch, colours, isInverse: inverse, percent }), [stretch, colours, inverse, percent]);
}

/** The image behind the sky panel, as fine as the panel's reach needs it. */
export function useBackdrop(detectionId: string, centre: { raDeg: number; decDeg: number }, viewReach: number) {
  const { shown, blinks } = useImageSettings();
  const { data } = useQuery(observationsQuery(detectionId));
  const images = useMemo(() => finestFirst(data?.items ?? []), [data]);
  const chosen = shown === null ? undefined : (images.find(({ label }) => label === shown) ?? images[0]);
  useBlinking(blinks && shown !== null, images, chosen);
  const full = chosen ? Math.min(WIDEST, reachOf(chosen, centre)) : 1;
  const half = Math.min(full, Math.max(16, viewReach));
  const raster = useQuery({
    ...rasterQuery(chosen?.id ?? '', half, (2 * half) / (chosen?.image.pixelArcsec ?? 1)),
    enabled: chosen !== undefined,
    // A coarser raster of the same image stands in while a finer one comes; one of another image never does.
    placeholderData: (before, query) => (query?.queryKey[1] === chosen?.id ? before : undefined),
  });
  const look = useLook();
  const [point, setPoint] = useState<readonly [number, number] | null>(null);
  const backdrop = useMemo<Backdrop | undefined>(
    () => (chosen && raster.data ? { raster: raster.data, look, onPoint: setPoint } : undefined),
    [chosen, raster.data, look],
  );
  return { images, chosen, backdrop, point, error: raster.error };
}

function useBlinking(isOn: boolean, images: readonly ImageObservation[], chosen: ImageObservation | undefined): void {
  useEffect(() => {
    if (!isOn || images.length < 2 || !chosen) return;
    const timer = setTimeout(() => {
      const next = images[(images.indexOf(chosen) + 1) % images.length]!;
      setImageSettings({ shown: next.label });
    }, BLINK_MS);
    return () => clearTimeout(timer);
  }, [isOn, images, chosen]);
}
