import { type DrawingTheme, SCREEN } from '@eremite/shared/drawing/drawing-theme';

/** The theme with its variables resolved, for canvases, which know no variables. */
export function resolvedTheme(element: Element): DrawingTheme {
  const style = getComputedStyle(element);
  const resolve = (value: string) => {
    const name = /^var\((--[\w-]+)\)$/.exec(value)?.[1];
    return name ? style.getPropertyValue(name).trim() : value;
  };
  return Object.fromEntries(
    Object.entries(SCREEN).map(([key, value]) => [key, resolve(value)]),
  ) as unknown as DrawingTheme;
}
