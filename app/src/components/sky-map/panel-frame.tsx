import type OlMap from 'ol/Map.js';
import { useEffect } from 'react';
import { Frame, type PanelView } from './frame.tsx';
import { usePanelView } from './use-panel-view.ts';

interface PanelFrameProps {
  map: OlMap | undefined;
  /** Angular-diameter distance, Mpc. */
  distanceMpc: number | null;
  /** Told how far from the detection the panel looks, arcsec. */
  onReach: ((radiusArcsec: number) => void) | undefined;
}

/** The rulers about the map. They follow every frame of a move, and so stand apart from the rest of the panel. */
export function PanelFrame({ map, distanceMpc, onReach }: PanelFrameProps) {
  const view = usePanelView(map);
  const corner = view ? cornerOf(view) : 0;
  useEffect(() => {
    if (corner > 0) onReach?.(corner);
  }, [corner, onReach]);
  return view && <Frame view={view} distanceMpc={distanceMpc} />;
}

/** How far the furthest corner of the view is from the detection, arcsec, rounded up so that it changes seldom. */
function cornerOf({ centre, resolution, width, height }: PanelView): number {
  const far = Math.hypot(
    Math.abs(centre[0]) + (width / 2) * resolution,
    Math.abs(centre[1]) + (height / 2) * resolution,
  );
  return 2 ** Math.ceil(Math.log2(Math.max(1, far)));
}
