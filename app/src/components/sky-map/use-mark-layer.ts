import Feature from 'ol/Feature.js';
import Point from 'ol/geom/Point.js';
import VectorLayer from 'ol/layer/Vector.js';
import type OlMap from 'ol/Map.js';
import VectorSource from 'ol/source/Vector.js';
import type Style from 'ol/style/Style.js';
import { useEffect, useRef } from 'react';
import { markLabel } from './mark-label.ts';
import { litStyle, markStyle } from './mark-style.ts';
import type { Palette } from './palette.ts';
import { toPanel } from '@eremite/shared/drawing/panel-plane';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

interface MarkLayerOptions {
  map: OlMap | undefined;
  marks: readonly SkyMark[];
  centre: { raDeg: number; decDeg: number };
  palette: Palette | undefined;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

/** Draws the objects and links pointing and choosing with whoever else shows them. */
export function useMarkLayer(options: MarkLayerOptions): void {
  const { map, marks, centre, palette, hovered, selected } = options;
  const layer = useRef<VectorLayer | null>(null);
  const lit = useRef({ hovered, selected });
  const call = useRef(options);
  useEffect(() => {
    call.current = options;
  });

  useEffect(() => {
    if (!map || !palette) return;
    const features = marks.flatMap((mark) => {
      const at = toPanel(mark.raDeg, mark.decDeg, centre);
      if (!at) return [];
      const feature = new Feature({ geometry: new Point(at), mark });
      feature.setId(mark.key);
      return [feature];
    });
    const kept = new Map<string, Style>();
    const style = (feature: { get: (key: string) => unknown }) => {
      const mark = feature.get('mark') as SkyMark;
      const own = kept.get(mark.key) ?? markStyle(mark, palette);
      kept.set(mark.key, own);
      const chosen = lit.current.selected === mark.key;
      if (!chosen && lit.current.hovered !== mark.key) return own;
      return [own, litStyle(mark, markLabel(mark), palette, chosen)];
    };
    const created = new VectorLayer({ source: new VectorSource({ features }), style, zIndex: 3, declutter: false });
    layer.current = created;
    map.addLayer(created);
    return () => {
      map.removeLayer(created);
      created.dispose();
      layer.current = null;
    };
  }, [map, marks, centre, palette]);

  useEffect(() => {
    lit.current = { hovered, selected };
    layer.current?.changed();
  }, [hovered, selected]);

  useEffect(() => {
    if (!map) return;
    const under = (pixel: number[]): string | null =>
      map.forEachFeatureAtPixel(pixel, (feature) => (feature.get('mark') as SkyMark | undefined)?.key, {
        hitTolerance: 5,
        layerFilter: (candidate) => candidate === layer.current,
      }) ?? null;
    const move = map.on('pointermove', (event) => {
      if (!event.dragging) call.current.onHover(under(event.pixel));
    });
    const click = map.on('click', (event) => call.current.onSelect(under(event.pixel)));
    return () => [move, click].forEach(({ target, type, listener }) => target.removeEventListener(type, listener));
  }, [map]);
}
