import type { DrawingTheme } from './drawing-theme.ts';
import type { PanelPoint } from './panel-plane.ts';

/** Where the square field of a finder chart lies on the picture, pixels. */
export interface FinderField {
  /** Place on the picture of a point in arcsec on the tangent plane. */
  place: (point: PanelPoint) => [number, number];
  /** Pixels an arcsec. */
  perArcsec: number;
  theme: DrawingTheme;
  /** Begins every id of the picture. */
  idPrefix: string;
  left: number;
  top: number;
  size: number;
}
