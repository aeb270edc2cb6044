/** The theme's colours as the canvas needs them: resolved, not as variables. */
export interface Palette {
  field: string;
  text: string;
  muted: string;
  line: string;
  hatch: string;
  amber: string;
  lit: string;
  concordant: string;
  other: string;
  none: string;
  ultraviolet: string;
}

export function readPalette(element: Element): Palette {
  const style = getComputedStyle(element);
  const read = (name: string) => style.getPropertyValue(name).trim();
  return {
    field: read('--field'),
    text: read('--text'),
    muted: read('--muted'),
    line: read('--line-strong'),
    hatch: read('--hatch'),
    amber: read('--amber'),
    lit: read('--lit'),
    concordant: read('--concordant'),
    other: read('--other-velocity'),
    none: read('--no-velocity'),
    ultraviolet: read('--ultraviolet'),
  };
}

/** Spacing and slant of the strokes, so that what several catalogues left out is hatched both ways. */
const HATCHES: Record<string, { gap: number; falling: boolean }> = {
  ultraviolet: { gap: 22, falling: false },
  infrared: { gap: 22, falling: true },
  continuum: { gap: 16, falling: true },
};

/** Slanted strokes for what was not observed, so that empty never looks like unobserved. */
export function hatchPattern(colour: string, kind?: string): CanvasPattern | string {
  const { gap, falling } = HATCHES[kind ?? ''] ?? { gap: 9, falling: false };
  const tile = document.createElement('canvas');
  tile.width = tile.height = gap;
  const context = tile.getContext('2d');
  if (!context) return colour;
  context.strokeStyle = colour;
  context.lineWidth = 1.2;
  context.beginPath();
  for (const shift of [-gap, 0, gap]) {
    context.moveTo(shift - 1, falling ? -1 : gap + 1);
    context.lineTo(shift + gap + 1, falling ? gap + 1 : -1);
  }
  context.stroke();
  return context.createPattern(tile, 'repeat') ?? colour;
}
