import { useSyncExternalStore } from 'react';
import type { ColourMap } from './colour-maps.ts';
import type { Stretch } from './stretch.ts';

/** How images are looked at; it stays on the way from one detection to the next. */
export interface ImageSettings {
  /** Label of the image behind the panel, so that the next detection shows the same band; '' is the first, null none. */
  shown: string | null;
  stretch: Stretch;
  colours: ColourMap;
  /** Dark objects on a bright sky; null goes by the theme. */
  isInverse: boolean | null;
  percent: number;
  /** Whether the bands are shown in turn. */
  blinks: boolean;
}

let current: ImageSettings = {
  shown: '',
  stretch: 'asinh',
  colours: 'grey',
  isInverse: null,
  percent: 99.5,
  blinks: false,
};
const listeners = new Set<() => void>();

export function setImageSettings(change: Partial<ImageSettings>): void {
  current = { ...current, ...change };
  listeners.forEach((listener) => listener());
}

export const useImageSettings = (): ImageSettings =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => current,
  );
