import { element, px } from './svg.ts';

/** Spacing and slant of the strokes, so that what several catalogues left out is hatched both ways. */
const HATCHES: Record<string, { gap: number; falling: boolean }> = {
  ultraviolet: { gap: 22, falling: false },
  infrared: { gap: 22, falling: true },
  continuum: { gap: 16, falling: true },
};

/** How the sky a kind of catalogue left out is hatched. @returns spacing in pixels, and whether strokes fall to the right */
export const hatchOf = (kind: string): { gap: number; falling: boolean } => HATCHES[kind] ?? { gap: 9, falling: false };

/** A pattern of slanted strokes, to be put among the definitions. @param id unique on the page */
export function hatchPattern(id: string, kind: string, colour: string): string {
  const { gap, falling } = hatchOf(kind);
  const strokes = [-gap, 0, gap]
    .map(
      (shift) => `M${px(shift - 1)} ${px(falling ? -1 : gap + 1)}L${px(shift + gap + 1)} ${px(falling ? gap + 1 : -1)}`,
    )
    .join('');
  return element(
    'pattern',
    { id, width: gap, height: gap, patternUnits: 'userSpaceOnUse' },
    element('path', { d: strokes, stroke: colour, 'stroke-width': 1.2, fill: 'none' }),
  );
}
