import { DEGREE, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { toGalactic } from '../sky/galactic.ts';

const C = SPEED_OF_LIGHT_KMS;

/** Frames of rest in which velocities are given. Heliocentric and barycentric differ by at most 0.013 km/s. */
export const VELOCITY_FRAMES = ['barycentric', 'heliocentric', 'lsrk', 'lsrd', 'gsr', 'yts77', 'km96', 'cmb'] as const;
export type VelocityFrame = (typeof VELOCITY_FRAMES)[number];

/** How a motion is combined with cz: added, or redshifts multiplied, 1 + z' = (1 + z)(1 + V·n/c). */
export type Combination = 'additive' | 'multiplicative';

/** Motion of the Sun in a frame: Galactic components, km/s (towards l = 0, towards l = 90°, towards b = 90°). */
interface SolarMotion {
  readonly u: number;
  readonly v: number;
  readonly w: number;
  readonly combination: Combination;
  readonly source: string;
}

function towards(speedKms: number, lDeg: number, bDeg: number, combination: Combination, source: string): SolarMotion {
  const across = speedKms * Math.cos(bDeg * DEGREE);
  return {
    u: across * Math.cos(lDeg * DEGREE),
    v: across * Math.sin(lDeg * DEGREE),
    w: speedKms * Math.sin(bDeg * DEGREE),
    combination,
    source,
  };
}

const AT_REST: SolarMotion = { u: 0, v: 0, w: 0, combination: 'additive', source: 'definition' };

/** Apex of the kinematic local standard of rest: RA 18h, Dec +30° of B1900, in Galactic coordinates, degrees. */
export const LSRK_APEX_DEG = { l: 56.157456588510506, b: 22.76480182408036 } as const;

/**
 * Solar motion by frame. The local frames are added to cz, as their definitions and the published velocities do; the
 * CMB motion is large enough that redshifts are multiplied.
 */
export const SOLAR_MOTION: Readonly<Record<VelocityFrame, SolarMotion>> = {
  barycentric: AT_REST,
  heliocentric: AT_REST,
  lsrk: towards(20, LSRK_APEX_DEG.l, LSRK_APEX_DEG.b, 'additive', 'Gordon (1975): 20 km/s to 18h, +30° (B1900)'),
  lsrd: towards(16.6, 53.1, 25, 'additive', 'Delhaye (1965): 16.6 km/s to l 53.1°, b 25° (from memory)'),
  gsr: { u: 9, v: 232, w: 7, combination: 'additive', source: 'de Vaucouleurs et al. (1991), RC3 (from memory)' },
  yts77: {
    u: -79,
    v: 296,
    w: -36,
    combination: 'additive',
    source: 'Yahil, Tammann & Sandage (1977), ApJ 217, 903',
  },
  km96: towards(316, 93, -4, 'additive', 'Karachentsev & Makarov (1996), AJ 111, 794'),
  cmb: towards(369.82, 264.021, 48.253, 'multiplicative', 'Planck Collaboration (2018) I (from memory)'),
};

/**
 * Component of the solar motion towards a source.
 *
 * @param frame frame in which the Sun moves
 * @param ra right ascension (ICRS), radians
 * @param dec declination (ICRS), radians
 * @returns km/s, positive where the Sun moves towards the source
 * @throws {DomainError} for an unknown frame or a direction out of range
 */
export function solarMotionTowards(frame: VelocityFrame, ra: number, dec: number): number {
  const motion = SOLAR_MOTION[frame] as SolarMotion | undefined;
  if (!motion) {
    throw new DomainError(`velocity frame "${String(frame)}" is unknown; known are ${VELOCITY_FRAMES.join(', ')}`);
  }
  if (motion === AT_REST) return 0;
  const { lon: l, lat: b } = toGalactic(ra, dec);
  return (motion.u * Math.cos(l) + motion.v * Math.sin(l)) * Math.cos(b) + motion.w * Math.sin(b);
}

function assertCz(where: string, czKms: number): void {
  if (!(czKms > -C && czKms < Infinity)) throw new DomainError(`${where}: expected a finite cz above -c, got ${czKms}`);
}

/**
 * A barycentric cz in another frame of rest.
 *
 * @param frame frame wanted
 * @param czKms optical cz, barycentric, km/s; negative values are legal
 * @param ra right ascension (ICRS), radians
 * @param dec declination (ICRS), radians
 * @param combination how to combine; by default additive but for the CMB
 * @returns optical cz in the frame, km/s
 * @throws {DomainError} for an unknown frame or arguments out of range
 *
 * Topocentric velocities need the site and time and must be corrected where they were observed.
 * Source of each vector: {@link SOLAR_MOTION}.
 *
 * Method: velocity.
 */
export function fromBarycentric(
  frame: VelocityFrame,
  czKms: number,
  ra: number,
  dec: number,
  combination: Combination = SOLAR_MOTION[frame]?.combination,
): number {
  assertCz('fromBarycentric', czKms);
  const motion = solarMotionTowards(frame, ra, dec);
  return combination === 'multiplicative' ? czKms + motion + (czKms * motion) / C : czKms + motion;
}

/**
 * The barycentric cz of a velocity in another frame, the inverse of {@link fromBarycentric}.
 *
 * @param frame frame the velocity is in
 * @param czKms optical cz in that frame, km/s
 * @param ra right ascension (ICRS), radians
 * @param dec declination (ICRS), radians
 * @param combination how it was combined; by default additive but for the CMB
 * @returns optical cz, barycentric, km/s
 * @throws {DomainError} for an unknown frame or arguments out of range
 */
export function toBarycentric(
  frame: VelocityFrame,
  czKms: number,
  ra: number,
  dec: number,
  combination: Combination = SOLAR_MOTION[frame]?.combination,
): number {
  assertCz('toBarycentric', czKms);
  const motion = solarMotionTowards(frame, ra, dec);
  return combination === 'multiplicative' ? (czKms - motion) / (1 + motion / C) : czKms - motion;
}

/**
 * A topocentric cz with the barycentric correction that the telescope supplied.
 *
 * @param czKms topocentric optical cz, km/s
 * @param correctionKms velocity of the telescope towards the source, km/s
 * @returns optical cz, barycentric, km/s: cz + v + cz v/c
 * @throws {DomainError} for values out of range
 *
 * Source: Wright & Eastman (2014), PASP 126, 838 (form, from memory).
 */
export function applyTelescopeCorrection(czKms: number, correctionKms: number): number {
  assertCz('applyTelescopeCorrection', czKms);
  if (!(Math.abs(correctionKms) < C)) throw new DomainError(`applyTelescopeCorrection: got ${correctionKms} km/s`);
  return czKms + correctionKms + (czKms * correctionKms) / C;
}
