import { useSyncExternalStore } from 'react';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

/** What a person chose to see on the sky panel; it stays on the way from one detection to the next. */
export interface SkySettings {
  /** Catalogues whose objects and hatching are hidden. */
  hidden: readonly string[];
  /** Faintest magnitude shown; objects without one always are. */
  faintestMag: number | null;
  /** Largest velocity difference shown, km/s. */
  windowKms: number | null;
  /** Whether objects without a velocity are shown. */
  withoutVelocity: boolean;
}

export const EVERYTHING: SkySettings = { hidden: [], faintestMag: null, windowKms: null, withoutVelocity: true };
let current = EVERYTHING;
const listeners = new Set<() => void>();

export function setSkySettings(change: Partial<SkySettings>): void {
  current = { ...current, ...change };
  listeners.forEach((listener) => listener());
}

export const useSkySettings = (): SkySettings =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => current,
  );

/** Whether an object passes the settings. */
export function isShown(
  { catalogueId, magnitude, velocityDifferenceKms: dv }: SkyMark,
  { hidden, faintestMag, windowKms, withoutVelocity }: SkySettings,
): boolean {
  if (hidden.includes(catalogueId)) return false;
  if (faintestMag !== null && magnitude !== null && magnitude > faintestMag) return false;
  if (dv === null) return withoutVelocity;
  return windowKms === null || Math.abs(dv) <= windowKms;
}
