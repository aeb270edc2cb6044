import { Button, ButtonGroup } from '@blueprintjs/core';
import { type PanelPoint, rayleighRadius } from '@eremite/shared/drawing/panel-plane';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import VectorLayer from 'ol/layer/Vector.js';
import type OlMap from 'ol/Map.js';
import VectorSource from 'ol/source/Vector.js';
import { useEffect, useId, useMemo, useState, type KeyboardEvent } from 'react';
import { SaveMenu } from '#components/save-menu/save-menu.tsx';
import { usePreferences } from '#lib/preferences.ts';
import { fileNameOf } from '#lib/save-picture.ts';
import { markFacts } from './mark-label.ts';
import { measure, measuredText } from './measure.ts';
import { hatchedFeatures, outlineFeatures, type Outlines } from './outline-layers.ts';
import { readPalette, type Palette } from './palette.ts';
import { PanelFrame } from './panel-frame.tsx';
import { type PanelLayer, panelLayers } from './panel-layer.ts';
import { SkyControls } from './sky-controls.tsx';
import { SkyLegend } from './sky-legend.tsx';
import { isShown, useSkySettings } from './sky-settings.ts';
import { unseenAtCentre } from './unseen-at-centre.ts';
import { type Backdrop, useImageLayer } from './use-image-layer.ts';
import { useMarkLayer } from './use-mark-layer.ts';
import { useSkyMap } from './use-sky-map.ts';
import './sky-panel.css';

interface SkyPanelProps {
  name: string;
  centre: { raDeg: number; decDeg: number };
  /** Angular-diameter distance, Mpc. */
  distanceMpc: number | null;
  outlines: Outlines;
  marks: readonly SkyMark[];
  /** Tables that were searched, in the order of the list of layers. */
  tables: readonly Omit<PanelLayer, 'objects'>[];
  /** What of the field is not shown, in words; empty where all of it is. */
  note?: string;
  /** An image behind the objects. */
  backdrop?: Backdrop | undefined;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
  /** Told how far from the detection the panel looks, arcsec. */
  onReach?: (radiusArcsec: number) => void;
  /** Finder chart of what the panel shows, as SVG. */
  drawFinder?: (view: { centre: PanelPoint; radiusArcsec: number; marks: readonly SkyMark[] }) => string;
}

/** The sky about one detection: east left, north up, the frame its ruler. The tables beside it list the same objects. */
export function SkyPanel(props: SkyPanelProps) {
  const { centre, outlines, marks, tables, distanceMpc, hovered, selected, onHover, onSelect, onReach } = props;
  const { target, map } = useSkyMap();
  const { theme } = usePreferences();
  const settings = useSkySettings();
  const hasImage = props.backdrop !== undefined;
  const legend = useId();
  const palette = usePalette(theme);
  const [measuredFrom, setMeasuredFrom] = useState<SkyMark | null>(null);
  const shown = useMemo(() => marks.filter((mark) => isShown(mark, settings)), [marks, settings]);
  const layers = useMemo(() => panelLayers(tables, marks), [tables, marks]);
  const visible = useMemo(
    () => ({ ...outlines, uncovered: outlines.uncovered.filter(({ id }) => !settings.hidden.includes(id)) }),
    [outlines, settings],
  );
  const chosen = useMemo(() => shown.find(({ key }) => key === selected), [shown, selected]);
  const measured =
    measuredFrom && chosen && chosen.key !== measuredFrom.key
      ? measuredText(measure(measuredFrom, chosen, distanceMpc))
      : '';

  useEffect(() => {
    if (!map) return;
    const drawn = [
      new VectorLayer({
        source: new VectorSource({ features: hatchedFeatures(visible, palette) }),
        zIndex: 1,
        // Over an image the hatching must not hide what is to be seen.
        opacity: hasImage ? 0.25 : 1,
      }),
      new VectorLayer({ source: new VectorSource({ features: outlineFeatures(visible, palette) }), zIndex: 2 }),
    ];
    drawn.forEach((layer) => map.addLayer(layer));
    return () =>
      drawn.forEach((layer) => {
        map.removeLayer(layer);
        layer.getSource()?.clear();
        layer.dispose();
      });
  }, [map, visible, palette, hasImage]);
  useImageLayer(map, props.backdrop, theme);
  useMarkLayer({
    map,
    marks: shown,
    centre,
    theme,
    hovered,
    selected,
    measuredFrom: measuredFrom?.key ?? null,
    measuredText: measured,
    onHover,
    onSelect,
  });

  const reach = useMemo(() => reaches(outlines), [outlines]);
  /** Shows a circle of a radius in arcsec about the detection. */
  const show = useMemo(
    () => (radius: number) => map?.getView().fit([-radius, -radius, radius, radius], { padding: [8, 8, 8, 8] }),
    [map],
  );
  useEffect(() => {
    show(reach.beam);
    // The reach is that of the detection: a new one is a new panel.
  }, [show, reach.beam]);
  const zoom = (factor: number) => {
    const resolution = map?.getView().getResolution();
    if (resolution) map?.getView().setResolution(resolution * factor);
  };
  const step = (by: 1 | -1) => {
    const inOrder = [...shown].sort((a, b) => a.separationArcsec - b.separationArcsec);
    const at = inOrder.findIndex(({ key }) => key === selected);
    const next = inOrder[at < 0 ? (by > 0 ? 0 : inOrder.length - 1) : at + by];
    if (next) onSelect(next.key);
  };
  const startMeasuring = () => setMeasuredFrom(measuredFrom ? null : (chosen ?? null));
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const act = { ']': () => step(1), '[': () => step(-1), m: startMeasuring }[event.key];
    if (!act) return;
    event.preventDefault();
    event.stopPropagation();
    act();
  };
  const unseen = useMemo(() => unseenAtCentre(visible.uncovered), [visible]);
  return (
    <figure className="sky-panel">
      <div
        ref={target}
        className="sky-panel__map"
        tabIndex={0}
        role="group"
        onKeyDown={onKeyDown}
        aria-label={`Sky about ${props.name}: ${shown.length} objects. Arrow keys move, plus and minus zoom, square brackets step through the objects from the middle outwards, M measures from the chosen one; the tables list the same objects.`}
        aria-describedby={legend}
      />
      <PanelFrame map={map} distanceMpc={distanceMpc} onReach={onReach} />
      <div className="sky-panel__zoom">
        <ButtonGroup>
          <Button size="small" text="error" onClick={() => show(reach.error)} />
          <Button size="small" text="beam" onClick={() => show(reach.beam)} />
          <Button size="small" text="field" onClick={() => show(reach.field)} />
          {reach.neighbours && <Button size="small" text="neighbours" onClick={() => show(reach.neighbours!)} />}
        </ButtonGroup>
        <ButtonGroup>
          <Button
            size="small"
            text="measure"
            active={measuredFrom !== null}
            aria-pressed={measuredFrom !== null}
            disabled={!chosen && !measuredFrom}
            title="Distance from the chosen object to the next one you choose"
            onClick={startMeasuring}
          />
          <SkyControls layers={layers} settings={settings} />
          {props.drawFinder && map && (
            <SaveMenu
              label="Save a finder chart"
              fileName={fileNameOf(`${props.name}-finder`)}
              draw={() => props.drawFinder!({ ...lookOf(map), marks: shown })}
            />
          )}
          <Button size="small" text="+" aria-label="Zoom in" onClick={() => zoom(1 / 1.5)} />
          <Button size="small" text="−" aria-label="Zoom out" onClick={() => zoom(1.5)} />
        </ButtonGroup>
      </div>
      <div className="sky-panel__notes">
        {unseen.length > 0 && <p>not observed here: {unseen.join(', ')}</p>}
        {(shown.length < marks.length || props.note) && (
          <p>
            {shown.length < marks.length && `${shown.length} of ${marks.length} objects pass the filter`}
            {shown.length < marks.length && props.note && '; '}
            {props.note}
          </p>
        )}
        {measuredFrom && (
          <p>
            from {measuredFrom.name} {measured ? `to ${chosen!.name}: ${measured}` : 'to the next object you choose'}
          </p>
        )}
      </div>
      <p className="visually-hidden" role="status">
        {chosen
          ? `${chosen.name}: ${markFacts(chosen)}${measured ? `. From ${measuredFrom!.name}: ${measured}` : ''}`
          : ''}
      </p>
      <SkyLegend id={legend} uncovered={visible.uncovered.map(({ name }) => name)} />
    </figure>
  );
}

/** Middle and half height of what the map shows, arcsec. */
function lookOf(map: OlMap): { centre: PanelPoint; radiusArcsec: number } {
  const [x = 0, y = 0] = map.getView().getCenter() ?? [];
  const height = map.getSize()?.[1] ?? 0;
  return { centre: [x, y], radiusArcsec: (height / 2) * (map.getView().getResolution() ?? 1) };
}

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
