/** Size of a label's letters, pixels; a monospaced letter is 0.6 of it wide. */
export const LABEL_SIZE = 11;
const LETTER = 0.6 * LABEL_SIZE;
const LINE = LABEL_SIZE + 2;
/** Steps down and up in which a free place is looked for. */
const SHIFTS = [0, 1, -1, 2, -2, 3, -3, 4, -4];

export interface Label {
  x: number;
  /** Base line. */
  y: number;
  text: string;
  anchor: 'start' | 'end';
}

/**
 * Labels beside their marks so that none covers another: each is moved up or down by lines until it is free, and to the
 * left of its mark where it would leave the field; one without a free place stays where it is.
 *
 * @param wanted marks with their names, the most important first; `clear` is the gap to the label, pixels
 * @param rightEdge end of the field, pixels
 */
export function placeLabels(
  wanted: readonly { x: number; y: number; text: string; clear: number }[],
  rightEdge: number,
): Label[] {
  const taken: { left: number; right: number; y: number }[] = [];
  return wanted.map(({ x, y, text, clear }) => {
    const width = text.length * LETTER;
    const toLeft = x + clear + width > rightEdge;
    const left = toLeft ? x - clear - width : x + clear;
    const isFree = (at: number) =>
      taken.every((other) => left > other.right || left + width < other.left || Math.abs(at - other.y) >= LINE);
    const shift = SHIFTS.find((step) => isFree(y + step * LINE)) ?? 0;
    const at = y + shift * LINE;
    taken.push({ left, right: left + width, y: at });
    return { x: toLeft ? x - clear : x + clear, y: at + 4, text, anchor: toLeft ? 'end' : 'start' };
  });
}
