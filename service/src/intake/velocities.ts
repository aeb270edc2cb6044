import { DEGREE, HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import { toOpticalCz } from '@eremite/shared/science/velocity/conventions';
import { toBarycentric, type VelocityFrame } from '@eremite/shared/science/velocity/frames';
import type { ResolvedSettings } from './resolved.ts';

const C = SPEED_OF_LIGHT_KMS;
/** Local Group velocities are undone with the vector of Karachentsev & Makarov (1996). */
const FRAMES: Readonly<Record<ResolvedSettings['velocity']['frame'], VelocityFrame>> = {
  barycentric: 'barycentric',
  lsrk: 'lsrk',
  'local-group': 'km96',
  cmb: 'cmb',
};

/**
 * Optical, barycentric cz (km/s) of a column of velocities, in place; NaN stays, and what no line can have becomes NaN.
 *
 * @param values km/s, z, or MHz as `what` says
 * @param raDeg ICRS, for frames other than barycentric; rows without a position become NaN
 */
export function toBarycentricCz(
  values: Float64Array,
  what: 'optical' | 'radio' | 'relativistic' | 'redshift' | 'frequency',
  frame: ResolvedSettings['velocity']['frame'],
  raDeg: Float64Array,
  decDeg: Float64Array,
): Float64Array {
  const limit = what === 'radio' || what === 'relativistic' ? C : Infinity;
  if (what !== 'optical') {
    for (let i = 0; i < values.length; i++) {
      const value = values[i]!;
      if (!Number.isNaN(value)) values[i] = Math.abs(value) < limit ? toOpticalCz(what, value) : NaN;
    }
  }
  if (frame === 'barycentric') return values;
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i]!)) continue;
    values[i] = Number.isNaN(raDeg[i]!)
      ? NaN
      : toBarycentric(FRAMES[frame], values[i]!, raDeg[i]! * DEGREE, decDeg[i]! * DEGREE);
  }
  return values;
}

/**
 * Widths in place, km/s of optical velocity: from MHz by c (1+z)² / f0, from radio velocity by (1+z)². A row without
 * a velocity is taken at z = 0 (under 1 % at 1500 km/s).
 */
export function toOpticalWidths(
  values: Float64Array,
  from: 'frequency' | 'radio',
  czKms: Float64Array | undefined,
): void {
  const scale = from === 'frequency' ? C / HI_REST_FREQUENCY_MHZ : 1;
  for (let i = 0; i < values.length; i++) values[i] = values[i]! * scale * (1 + redshift(czKms, i)) ** 2;
}

/** Jy km/s of optical velocity from Jy Hz, in place: S c (1+z)² / f0. */
export function toVelocityFlux(values: Float64Array, czKms: Float64Array | undefined): void {
  const scale = C / (HI_REST_FREQUENCY_MHZ * 1e6);
  for (let i = 0; i < values.length; i++) values[i] = values[i]! * scale * (1 + redshift(czKms, i)) ** 2;
}

const redshift = (czKms: Float64Array | undefined, i: number): number => {
  const z = (czKms?.[i] ?? 0) / C;
  return Number.isNaN(z) ? 0 : z;
};
