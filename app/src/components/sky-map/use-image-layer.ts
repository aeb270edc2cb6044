import Layer from 'ol/layer/Layer.js';
import type OlMap from 'ol/Map.js';
import { useEffect, useRef } from 'react';
import { type Look, type Raster, rasterCanvas } from '#components/sky-image/paint-raster.ts';

/** An image to be shown behind the objects. */
export interface Backdrop {
  raster: Raster;
  look: Look;
  /** Told the place under the pointer, arcsec with west positive; null when it leaves. */
  onPoint: (at: readonly [x: number, y: number] | null) => void;
}

const HATCH_STEP = 9;

/** Draws an image under everything else, at its place on the plane, and hatches what lies outside it. */
export function useImageLayer(map: OlMap | undefined, backdrop: Backdrop | undefined, theme: string): void {
  const raster = backdrop?.raster;
  const look = backdrop?.look;
  const onPoint = useRef(backdrop?.onPoint);
  useEffect(() => {
    onPoint.current = backdrop?.onPoint;
  });

  useEffect(() => {
    const painted = raster && look ? rasterCanvas(raster, look) : undefined;
    if (!map || !painted || !raster) return;
    const canvas = document.createElement('canvas');
    canvas.style.position = 'absolute';
    const hatchColour = getComputedStyle(document.documentElement).getPropertyValue('--hatch').trim() || '#888';
    const density = window.devicePixelRatio || 1;
    const layer = new Layer({
      zIndex: 0,
      render: ({ viewState: { center, resolution }, size: [width = 0, height = 0] }) => {
        const [w, h] = [Math.round(width * density), Math.round(height * density)];
        if (canvas.width !== w || canvas.height !== h) {
          [canvas.width, canvas.height] = [w, h];
          [canvas.style.width, canvas.style.height] = [`${width}px`, `${height}px`];
        }
        const context = canvas.getContext('2d');
        if (!context) return canvas;
        context.setTransform(density, 0, 0, density, 0, 0);
        context.clearRect(0, 0, width, height);
        hatch(context, width, height, hatchColour);
        const side = (2 * raster.halfArcsec) / resolution;
        const left = width / 2 + (-raster.halfArcsec - center[0]!) / resolution;
        const top = height / 2 - (raster.halfArcsec - center[1]!) / resolution;
        // Pixels are shown as they are, not smoothed into what was not measured.
        context.imageSmoothingEnabled = side < raster.pixels;
        context.drawImage(painted, left, top, side, side);
        return canvas;
      },
    });
    map.addLayer(layer);
    return () => {
      map.removeLayer(layer);
      layer.dispose();
      canvas.width = canvas.height = painted.width = painted.height = 0;
    };
  }, [map, raster, look, theme]);

  const isOn = backdrop !== undefined;
  useEffect(() => {
    if (!map || !isOn) return;
    const move = map.on('pointermove', ({ dragging, coordinate }) => {
      if (!dragging) onPoint.current?.([coordinate[0]!, coordinate[1]!]);
    });
    const leave = () => onPoint.current?.(null);
    const element = map.getViewport() as HTMLElement | undefined;
    element?.addEventListener('pointerleave', leave);
    return () => {
      move.target.removeEventListener(move.type, move.listener);
      element?.removeEventListener('pointerleave', leave);
    };
  }, [map, isOn]);
}

function hatch(context: CanvasRenderingContext2D, width: number, height: number, colour: string): void {
  context.strokeStyle = colour;
  context.lineWidth = 1;
  context.beginPath();
  for (let x = -height; x < width; x += HATCH_STEP) {
    context.moveTo(x, height);
    context.lineTo(x + height, 0);
  }
  context.stroke();
}
