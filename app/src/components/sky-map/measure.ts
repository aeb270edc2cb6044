import { positionAngle } from '@eremite/shared/science/sky/position-angle';
import { separation } from '@eremite/shared/science/sky/separation';
import { angleText, kpcText } from '@eremite/shared/drawing/measure-text';
import { ARCSEC_PER_RAD } from '@eremite/shared/drawing/panel-plane';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

const RAD = Math.PI / 180;
type Place = Pick<SkyMark, 'raDeg' | 'decDeg'>;

export interface Measured {
  arcsec: number;
  /** Projected at the distance of the gas; null without one. */
  kpc: number | null;
  /** Of the second seen from the first, degrees, north through east. */
  positionAngleDeg: number;
}

/** Great-circle distance between two objects. @param distanceMpc angular-diameter distance, or null */
export function measure(from: Place, to: Place, distanceMpc: number | null): Measured {
  const [ra1, dec1, ra2, dec2] = [from.raDeg * RAD, from.decDeg * RAD, to.raDeg * RAD, to.decDeg * RAD];
  const angle = separation(ra1, dec1, ra2, dec2);
  return {
    arcsec: angle * ARCSEC_PER_RAD,
    kpc: distanceMpc === null ? null : angle * distanceMpc * 1000,
    positionAngleDeg: angle === 0 ? 0 : positionAngle(ra1, dec1, ra2, dec2) / RAD,
  };
}

/** In words: `34″ = 5.6 kpc, PA 120°`. */
export const measuredText = ({ arcsec, kpc, positionAngleDeg }: Measured): string =>
  `${angleText(arcsec)}${kpc === null ? '' : ` = ${kpcText(kpc)}`}, PA ${positionAngleDeg.toFixed(0)}°`;
