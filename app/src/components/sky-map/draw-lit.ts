import type { DrawingTheme } from '@eremite/shared/drawing/drawing-theme';
import { markRadius } from '@eremite/shared/drawing/mark-glyph';
import type { PanelView } from './frame.tsx';
import type { MarkField } from './mark-field.ts';
import { markLabel } from './mark-label.ts';

interface Lit {
  field: MarkField;
  hovered: string | null;
  selected: string | null;
  measuredFrom: string | null;
  measuredText: string;
}

const FONT = '500 11.5px "Roboto Mono", monospace';
const LINE = 15;
/** Shortest measured line that carries its words, pixels. */
const LEAST_WORDED = 60;

function write(
  context: CanvasRenderingContext2D,
  text: string,
  x: number,
  y: number,
  { field, text: ink }: DrawingTheme,
) {
  context.font = FONT;
  context.lineJoin = 'round';
  text.split('\n').forEach((line, i) => {
    context.strokeStyle = field;
    context.lineWidth = 4;
    context.strokeText(line, x, y + i * LINE);
    context.fillStyle = ink;
    context.fillText(line, x, y + i * LINE);
  });
}

/** A ring and a label about the marks that are pointed at or chosen, and the line of a measured distance. */
export function drawLit(context: CanvasRenderingContext2D, view: PanelView, lit: Lit, theme: DrawingTheme): void {
  const toPixel = ({ x, y }: { x: number; y: number }): [number, number] => [
    view.width / 2 + (x - view.centre[0]) / view.resolution,
    view.height / 2 - (y - view.centre[1]) / view.resolution,
  ];
  const ring = (key: string | null, colour: string, withLabel: boolean) => {
    const found = lit.field.find(key);
    if (!found) return undefined;
    const [x, y] = toPixel(found);
    const radius = markRadius(found.mark.magnitude, found.mark.isStar) + 5;
    context.beginPath();
    context.arc(x, y, radius, 0, 2 * Math.PI);
    context.strokeStyle = colour;
    context.lineWidth = 1.6;
    context.stroke();
    if (withLabel) write(context, markLabel(found.mark), x + radius + 6, y - radius - 2, theme);
    return [x, y] as const;
  };
  const from = ring(lit.measuredFrom, theme.concordant, false);
  if (lit.hovered !== lit.selected) ring(lit.hovered, theme.text, true);
  const to = ring(lit.selected, theme.amber, true);
  if (!from || !to || lit.measuredText === '') return;
  context.beginPath();
  context.moveTo(...from);
  context.lineTo(...to);
  context.strokeStyle = theme.text;
  context.lineWidth = 1.2;
  context.setLineDash([6, 4]);
  context.stroke();
  context.setLineDash([]);
  // A short line has no room for its words beside the label; the note of the panel says them too.
  if (Math.hypot(to[0] - from[0], to[1] - from[1]) < LEAST_WORDED) return;
  write(context, lit.measuredText, (from[0] + to[0]) / 2 + 8, (from[1] + to[1]) / 2 + 16, theme);
}
