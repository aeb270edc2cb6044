import type OlMap from 'ol/Map.js';
import { useEffect, useState } from 'react';
import type { PanelView } from './frame.tsx';

/** Follows where the map looks, at most once a frame, for what is drawn around it. */
export function usePanelView(map: OlMap | undefined): PanelView | undefined {
  const [view, setView] = useState<PanelView>();
  useEffect(() => {
    if (!map) return;
    let frame = 0;
    const read = () => {
      frame = 0;
      const [width = 0, height = 0] = map.getSize() ?? [];
      const centre = map.getView().getCenter();
      const resolution = map.getView().getResolution();
      if (!centre || !resolution || width === 0) return;
      setView({ centre: [centre[0]!, centre[1]!], resolution, width, height });
    };
    const soon = () => (frame ||= requestAnimationFrame(read));
    soon();
    map.on('change:size', soon);
    map.getView().on(['change:center', 'change:resolution'], soon);
    return () => {
      cancelAnimationFrame(frame);
      map.un('change:size', soon);
      map.getView().un(['change:center', 'change:resolution'], soon);
    };
  }, [map]);
  return view;
}
