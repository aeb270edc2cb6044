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

/** Slanted strokes for what was not observed, so that empty never looks like unobserved. */
export function hatchPattern(colour: string): CanvasPattern | string {
  const tile = document.createElement('canvas');
  tile.width = tile.height = 9;
  const context = tile.getContext('2d');
  if (!context) return colour;
  context.strokeStyle = colour;
  context.lineWidth = 1.2;
  context.beginPath();
  for (const shift of [-9, 0, 9]) {
    context.moveTo(shift - 1, 10);
    context.lineTo(shift + 10, -1);
  }
  context.stroke();
  return context.createPattern(tile, 'repeat') ?? colour;
}
