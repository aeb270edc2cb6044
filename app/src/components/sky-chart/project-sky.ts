import { toTangentPlane } from '@eremite/shared/science/sky/tangent-plane';

const RAD = Math.PI / 180;

/** Maps directions (degrees) to a plane with north up and east left; undefined where the projection has no place. */
export interface SkyProjection {
  kind: 'field' | 'whole sky';
  centre: { raDeg: number; decDeg: number };
  place: (raDeg: number, decDeg: number) => [x: number, y: number] | undefined;
}

/** Mean direction, by the sum of unit vectors: right across RA zero and at the poles. */
export function meanDirection(positions: readonly { raDeg: number; decDeg: number }[]) {
  let [x, y, z] = [0, 0, 0];
  for (const { raDeg, decDeg } of positions) {
    x += Math.cos(decDeg * RAD) * Math.cos(raDeg * RAD);
    y += Math.cos(decDeg * RAD) * Math.sin(raDeg * RAD);
    z += Math.sin(decDeg * RAD);
  }
  const length = Math.hypot(x, y, z);
  const raDeg = (Math.atan2(y, x) / RAD + 360) % 360;
  return {
    raDeg,
    decDeg: Math.atan2(z, Math.hypot(x, y)) / RAD,
    spread: positions.length ? length / positions.length : 0,
  };
}

/** Hammer-Aitoff, equal-area; east left. Source: Snyder (1987), USGS PP 1395, p. 182 (from memory). */
function hammer(raDeg: number, decDeg: number, raCentre: number): [number, number] {
  const lon = ((((raDeg - raCentre + 180) % 360) + 360) % 360) - 180;
  const half = (lon * RAD) / 2;
  const d = Math.sqrt(1 + Math.cos(decDeg * RAD) * Math.cos(half));
  return [(-2 * Math.SQRT2 * Math.cos(decDeg * RAD) * Math.sin(half)) / d, (Math.SQRT2 * Math.sin(decDeg * RAD)) / d];
}

/** A tangent plane for a field that fits well within a hemisphere, the whole sky otherwise. */
export function chooseProjection(positions: readonly { raDeg: number; decDeg: number }[]): SkyProjection {
  const centre = meanDirection(positions);
  const cosine = ({ raDeg, decDeg }: { raDeg: number; decDeg: number }) =>
    Math.sin(decDeg * RAD) * Math.sin(centre.decDeg * RAD) +
    Math.cos(decDeg * RAD) * Math.cos(centre.decDeg * RAD) * Math.cos((raDeg - centre.raDeg) * RAD);
  const fits = positions.length > 0 && positions.every((position) => cosine(position) > Math.cos(50 * RAD));
  if (!fits) {
    return { kind: 'whole sky', centre: { raDeg: 180, decDeg: 0 }, place: (ra, dec) => hammer(ra, dec, 180) };
  }
  return {
    kind: 'field',
    centre,
    place: (ra, dec) => {
      const plane = toTangentPlane(ra * RAD, dec * RAD, centre.raDeg * RAD, centre.decDeg * RAD);
      return plane && [-plane.xi, plane.eta];
    },
  };
}

/** Steps in degrees for the lines of a chart of a given width. */
export const lineStep = (spanDeg: number): number =>
  [0.25, 0.5, 1, 2, 5, 10, 15, 30].find((step) => spanDeg / step <= 7) ?? 30;
