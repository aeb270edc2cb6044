import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import type { FrameState } from 'ol/Map.js';
import Layer from 'ol/layer/Layer.js';
import type OlMap from 'ol/Map.js';
import { useEffect, useMemo, useRef } from 'react';
import { drawLit } from './draw-lit.ts';
import type { PanelView } from './frame.tsx';
import { MarkField } from './mark-field.ts';
import { MarkSheets } from './mark-sheets.ts';
import { MarkSprites } from './mark-sprites.ts';
import { resolvedTheme } from './screen-theme.ts';

interface MarkLayerOptions {
  map: OlMap | undefined;
  marks: readonly SkyMark[];
  centre: { raDeg: number; decDeg: number };
  /** Name of the theme: colours are read anew when it changes. */
  theme: string;
  hovered: string | null;
  selected: string | null;
  /** The mark a distance is measured from. */
  measuredFrom: string | null;
  measuredText: string;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

/** How near the pointer must come to a mark, CSS pixels. */
const TOLERANCE = 9;

function viewOf({ viewState, size }: FrameState): PanelView {
  const [width = 0, height = 0] = size;
  return { centre: [viewState.center[0]!, viewState.center[1]!], resolution: viewState.resolution, width, height };
}

/** Draws the objects on a canvas of its own and links pointing and choosing with whoever else shows them. */
export function useMarkLayer(options: MarkLayerOptions): void {
  const { map, marks, centre, theme, hovered, selected, measuredFrom, measuredText } = options;
  const layer = useRef<Layer | null>(null);
  const relight = useRef<() => void>(() => undefined);
  const field = useMemo(() => new MarkField(marks, centre), [marks, centre]);
  const now = useRef({ ...options, field });
  useEffect(() => {
    now.current = { ...options, field };
  });

  useEffect(() => {
    if (!map) return;
    const colours = resolvedTheme(document.documentElement);
    const density = window.devicePixelRatio || 1;
    const sprites = new MarkSprites(colours, density);
    const sheets = new MarkSheets(density);
    let last: PanelView | undefined;
    // What is lit changes with every move of the pointer: it has a sheet of its own, so that the marks stay as they are.
    relight.current = () => last && drawLit(sheets.clear('lit', last), last, now.current, colours);
    const created = new Layer({
      zIndex: 3,
      render: (frame) => {
        last = viewOf(frame);
        now.current.field.draw(sheets.clear('marks', last), last, sprites);
        relight.current();
        return sheets.element;
      },
    });
    layer.current = created;
    map.addLayer(created);
    return () => {
      map.removeLayer(created);
      created.dispose();
      sheets.release();
      layer.current = null;
      relight.current = () => undefined;
    };
  }, [map, theme]);

  useEffect(() => {
    layer.current?.changed();
  }, [field]);
  useEffect(() => {
    relight.current();
  }, [hovered, selected, measuredFrom, measuredText]);

  useEffect(() => {
    if (!map) return;
    const under = (at: number[]) =>
      now.current.field.nearest(at[0]!, at[1]!, TOLERANCE * (map.getView().getResolution() ?? 1));
    const move = map.on('pointermove', (event) => {
      if (!event.dragging) now.current.onHover(under(event.coordinate));
    });
    const click = map.on('click', (event) => now.current.onSelect(under(event.coordinate)));
    return () => [move, click].forEach(({ target, type, listener }) => target.removeEventListener(type, listener));
  }, [map]);
}
