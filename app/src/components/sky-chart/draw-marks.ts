import type { StarlightVerdict } from '@eremite/shared/contracts/words';
import type { Palette } from '#components/sky-map/palette.ts';

export interface ChartMark {
  x: number;
  y: number;
  starlight: StarlightVerdict | null;
}

/** Order of drawing: the plain ones below, the rare ones on top. */
const ORDER: (StarlightVerdict | null)[] = [
  null,
  'starlit',
  'cannot tell',
  'confused',
  'contested',
  'nearly dark',
  'dark',
];

function ring(context: CanvasRenderingContext2D, { x, y }: ChartMark, radius: number) {
  context.beginPath();
  context.arc(x, y, radius, 0, 2 * Math.PI);
}

/** Draws verdict marks on a canvas that is already scaled to CSS pixels. */
export function drawMarks(context: CanvasRenderingContext2D, marks: readonly ChartMark[], palette: Palette): void {
  const sorted = [...marks].sort((a, b) => ORDER.indexOf(a.starlight) - ORDER.indexOf(b.starlight));
  for (const mark of sorted) {
    context.setLineDash([]);
    context.lineWidth = 1.7;
    context.globalAlpha = 1;
    switch (mark.starlight) {
      case 'dark':
      case 'nearly dark':
        context.strokeStyle = palette.amber;
        ring(context, mark, 5);
        context.stroke();
        if (mark.starlight === 'dark') break;
        context.fillStyle = palette.amber;
        ring(context, mark, 1.6);
        context.fill();
        break;
      case 'starlit':
      case 'confused':
        context.globalAlpha = mark.starlight === 'starlit' ? 0.75 : 0.55;
        context.fillStyle = palette.lit;
        ring(context, mark, 3);
        context.fill();
        if (mark.starlight === 'starlit') break;
        ring(context, { ...mark, x: mark.x + 3 }, 3);
        context.fill();
        break;
      case 'contested':
        context.strokeStyle = palette.lit;
        context.lineWidth = 1.3;
        ring(context, { ...mark, x: mark.x - 1.7 }, 3.2);
        context.stroke();
        ring(context, { ...mark, x: mark.x + 1.7 }, 3.2);
        context.stroke();
        break;
      default:
        context.strokeStyle = palette.muted;
        context.lineWidth = 1.2;
        context.setLineDash([2, 2]);
        ring(context, mark, 4);
        context.stroke();
    }
  }
}
