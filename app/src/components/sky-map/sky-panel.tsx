import { Button, ButtonGroup } from '@blueprintjs/core';
import VectorLayer from 'ol/layer/Vector.js';
import VectorSource from 'ol/source/Vector.js';
import { useEffect, useId, useMemo } from 'react';
import { usePreferences } from '#lib/preferences.ts';
import { Frame } from './frame.tsx';
import { hatchedFeatures, outlineFeatures, type Outlines } from './outline-layers.ts';
import { readPalette, type Palette } from './palette.ts';
import { containsOrigin, rayleighRadius } from '@eremite/shared/drawing/panel-plane';
import { SkyLegend } from './sky-legend.tsx';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { useMarkLayer } from './use-mark-layer.ts';
import { usePanelView } from './use-panel-view.ts';
import { useSkyMap } from './use-sky-map.ts';
import './sky-panel.css';

interface SkyPanelProps {
  name: string;
  centre: { raDeg: number; decDeg: number };
  /** Angular-diameter distance, Mpc. */
  distanceMpc: number | null;
  outlines: Outlines;
  marks: readonly SkyMark[];
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

/** The sky about one detection: east left, north up, the frame its ruler. The tables beside it list the same objects. */
export function SkyPanel(props: SkyPanelProps) {
  const { centre, outlines, marks, distanceMpc, hovered, selected, onHover, onSelect } = props;
  const { target, map } = useSkyMap();
  const view = usePanelView(map);
  const { theme } = usePreferences();
  const legend = useId();
  const palette = usePalette(theme);

  useEffect(() => {
    if (!map) return;
    const layers = [
      new VectorLayer({ source: new VectorSource({ features: hatchedFeatures(outlines, palette) }), zIndex: 1 }),
      new VectorLayer({ source: new VectorSource({ features: outlineFeatures(outlines, palette) }), zIndex: 2 }),
    ];
    layers.forEach((layer) => map.addLayer(layer));
    return () =>
      layers.forEach((layer) => {
        map.removeLayer(layer);
        layer.dispose();
      });
  }, [map, outlines, palette]);
  useMarkLayer({ map, marks, centre, palette, hovered, selected, onHover, onSelect });

  const unseen = useMemo(() => unseenAtCentre(outlines), [outlines]);
  const reach = useMemo(() => reaches(outlines), [outlines]);
  /** Shows a circle of a radius in arcsec about the detection. */
  const show = useMemo(
    () => (radius: number) => map?.getView().fit([-radius, -radius, radius, radius], { padding: [8, 8, 8, 8] }),
    [map],
  );
  useEffect(() => {
    show(reach.beam);
  }, [show, reach]);
  const zoom = (factor: number) => {
    const resolution = map?.getView().getResolution();
    if (resolution) map?.getView().setResolution(resolution * factor);
  };
  return (
    <figure className="sky-panel">
      <div
        ref={target}
        className="sky-panel__map"
        tabIndex={0}
        role="group"
        aria-label={`Sky about ${props.name}: ${marks.length} objects. Arrow keys move, plus and minus zoom; the tables list the same objects.`}
        aria-describedby={legend}
      />
      {view && <Frame view={view} distanceMpc={distanceMpc} />}
      <div className="sky-panel__zoom">
        <ButtonGroup>
          <Button size="small" text="error" onClick={() => show(reach.error)} />
          <Button size="small" text="beam" onClick={() => show(reach.beam)} />
          <Button size="small" text="field" onClick={() => show(reach.field)} />
          {reach.neighbours && <Button size="small" text="neighbours" onClick={() => show(reach.neighbours!)} />}
        </ButtonGroup>
        <ButtonGroup>
          <Button size="small" text="+" aria-label="Zoom in" onClick={() => zoom(1 / 1.5)} />
          <Button size="small" text="−" aria-label="Zoom out" onClick={() => zoom(1.5)} />
        </ButtonGroup>
      </div>
      {unseen.length > 0 && <p className="sky-panel__unseen">not observed here: {unseen.join(', ')}</p>}
      <SkyLegend id={legend} uncovered={outlines.uncovered.map(({ name }) => name)} />
    </figure>
  );
}

/** Catalogues whose hatching covers the detection itself. */
const unseenAtCentre = ({ uncovered }: Outlines) =>
  uncovered.filter(({ cells }) => cells.some((ring) => containsOrigin(ring))).map(({ name }) => name);

/** Colours of the theme; the document carries the theme before anyone is told that it changed. */
function usePalette(theme: string): Palette {
  // The theme is the key of what is read from the document.
  // eslint-disable-next-line react-hooks/exhaustive-deps
  return useMemo(() => readPalette(document.documentElement), [theme]);
}

function reaches({ beam, positionError, searchRadiusArcsec, neighbourRadiusArcsec }: Outlines) {
  const search = Math.max(searchRadiusArcsec, (beam?.major ?? 0) / 2);
  return {
    error: positionError.majorArcsec * rayleighRadius(0.9973) * 1.25,
    beam: search * 1.45,
    field: search * 4.5,
    neighbours: neighbourRadiusArcsec === null ? null : neighbourRadiusArcsec * 1.06,
  };
}
