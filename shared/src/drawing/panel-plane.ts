import { toTangentPlane } from '../science/sky/tangent-plane.ts';

const RAD = Math.PI / 180;
export const ARCSEC_PER_RAD = (180 * 3600) / Math.PI;

export type PanelPoint = [x: number, y: number];

/**
 * Place of a direction on the panel: arcsec on the tangent plane at the centre, north up and east LEFT, so x = -xi.
 * @returns undefined for a direction 90 degrees or more away
 */
export function toPanel(
  raDeg: number,
  decDeg: number,
  centre: { raDeg: number; decDeg: number },
): PanelPoint | undefined {
  const plane = toTangentPlane(raDeg * RAD, decDeg * RAD, centre.raDeg * RAD, centre.decDeg * RAD);
  return plane && [-plane.xi * ARCSEC_PER_RAD, plane.eta * ARCSEC_PER_RAD];
}

/**
 * Outline of an ellipse on the panel.
 * @param major semi-axis, arcsec
 * @param minor semi-axis, arcsec
 * @param angleDeg position angle of the major axis, degrees, north through east
 */
export function ellipseOutline(major: number, minor: number, angleDeg: number, steps = 96): PanelPoint[] {
  const angle = angleDeg * RAD;
  return Array.from({ length: steps + 1 }, (_, i) => {
    const t = (2 * Math.PI * i) / steps;
    const along = major * Math.cos(t);
    const across = minor * Math.sin(t);
    const north = along * Math.cos(angle) - across * Math.sin(angle);
    const east = along * Math.sin(angle) + across * Math.cos(angle);
    return [-east, north];
  });
}

/** Radius in units of the one-dimensional sigma that holds a share of a circular Gaussian: sqrt(-2 ln(1 - share)). */
export const rayleighRadius = (share: number): number => Math.sqrt(-2 * Math.log(1 - share));

/** Whether the centre of the panel lies inside a closed ring (even-odd rule). */
export function containsOrigin(ring: readonly PanelPoint[]): boolean {
  let inside = false;
  for (let i = 1; i < ring.length; i++) {
    const [x1, y1] = ring[i - 1]!;
    const [x2, y2] = ring[i]!;
    if (y1 > 0 !== y2 > 0 && x1 - (y1 * (x2 - x1)) / (y2 - y1) > 0) inside = !inside;
  }
  return inside;
}
