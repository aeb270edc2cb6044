import { DEGREE } from '../constants.ts';
import { toIcrs } from '../sky/frames.ts';
import { separation } from '../sky/separation.ts';
import { fromBarycentric } from '../velocity/frames.ts';

/** A mass concentration of the flow model. */
export interface Attractor {
  readonly name: 'Virgo' | 'Great Attractor' | 'Shapley';
  /** Centre, radians, ICRS (published in B1950). */
  readonly ra: number;
  readonly dec: number;
  /** Velocity of the centre in the Local Group frame, km/s. */
  readonly velocityLgKms: number;
  /** Infall velocity of the Local Group towards it, km/s. */
  readonly infallKms: number;
  /** Radius of the cone in which galaxies are taken to be members, radians. */
  readonly coneRadius: number;
  /** Barycentric velocities of the members, km/s. */
  readonly membersKms: readonly [number, number];
}

function attractor(
  name: Attractor['name'],
  [raHours, decDeg]: readonly [number, number],
  velocityLgKms: number,
  infallKms: number,
  coneDeg: number,
  membersKms: readonly [number, number],
): Attractor {
  const centre = toIcrs('b1950', raHours * 15 * DEGREE, decDeg * DEGREE);
  return {
    name,
    ra: centre.lon,
    dec: centre.lat,
    velocityLgKms,
    infallKms,
    coneRadius: coneDeg * DEGREE,
    membersKms,
  };
}

/**
 * The three attractors. The published centres are B1950: precessed, the first is M87 within 0.4′.
 * Source: Mould et al. (2000), ApJ 529, 786, table A1.
 */
export const ATTRACTORS: readonly Attractor[] = [
  attractor('Virgo', [12 + 28 / 60 + 19 / 3600, 12 + 40 / 60], 957, 200, 10, [600, 2300]),
  attractor('Great Attractor', [13 + 20 / 60, -44], 4380, 400, 10, [2600, 6600]),
  attractor('Shapley', [13.5, -31], 13_600, 85, 12, [10_000, 16_000]),
];

/** Exponent of the density profile of each attractor, ρ ∝ r^-γ. */
const GAMMA = 2;
/** Closer to an attractor than this (km/s) the law is not evaluated; it diverges there. */
const CORE_KMS = 1e-6;

/** What one attractor contributes. */
export interface Infall {
  readonly attractor: Attractor['name'];
  /** Angle between source and attractor, radians. */
  readonly angle: number;
  /** Distance between source and attractor in velocity space, km/s. */
  readonly separationKms: number;
  /** Correction for infall, km/s, to be added to the Local Group velocity. */
  readonly infallKms: number;
  /** Whether the source lies in the cone and velocity range of members. */
  readonly member: boolean;
}

/** All branches of the flow model, so that a reader can see which was taken and what the others say. */
export interface FlowVelocity {
  /** Velocity in the Local Group frame of Yahil, Tammann & Sandage (1977), km/s. */
  readonly localGroupKms: number;
  readonly infalls: readonly Infall[];
  /** Velocity with all three infalls added, whatever the cones say, km/s. Singular near an attractor. */
  readonly smoothKms: number;
  /** Attractor whose cone holds the source; its velocity is then used. */
  readonly collapsedOn: Attractor['name'] | null;
  /** Cosmic velocity by the model: that of the attractor inside a cone, the smooth one elsewhere, km/s. */
  readonly cosmicKms: number;
}

/**
 * Cosmic velocity by linear infall to three attractors.
 *
 * @param czKms optical cz, barycentric, km/s
 * @param ra right ascension (ICRS), radians
 * @param dec declination (ICRS), radians
 * @param attractors the attractors; others than the published ones only to study their effect
 * @returns every branch, km/s
 * @throws {DomainError} for arguments out of range
 *
 * The correction for each attractor is v_fid [cos θ + ((v_o - v_a cos θ)/r_oa)(r_oa/v_a)^(1-γ)] with γ = 2. Inside a
 * cone the law fails (it yields -266 km/s beside the Great Attractor), so the collapse is not optional.
 * Source: Mould et al. (2000), ApJ 529, 786, appendix A.
 *
 * Method: distance.
 */
export function flowVelocity(
  czKms: number,
  ra: number,
  dec: number,
  attractors: readonly Attractor[] = ATTRACTORS,
): FlowVelocity {
  const localGroupKms = fromBarycentric('yts77', czKms, ra, dec);
  const infalls = attractors.map((a): Infall => {
    const angle = separation(ra, dec, a.ra, a.dec);
    const cosine = Math.cos(angle);
    const along = localGroupKms - a.velocityLgKms * cosine;
    const separationKms = Math.max(CORE_KMS, Math.hypot(along, a.velocityLgKms * Math.sin(angle)));
    const profile = (separationKms / a.velocityLgKms) ** (1 - GAMMA);
    return {
      attractor: a.name,
      angle,
      separationKms,
      infallKms: a.infallKms * (cosine + (along / separationKms) * profile),
      member: angle < a.coneRadius && czKms >= a.membersKms[0] && czKms <= a.membersKms[1],
    };
  });
  const smoothKms = infalls.reduce((sum, infall) => sum + infall.infallKms, localGroupKms);
  const index = infalls.findIndex((infall) => infall.member);
  return {
    localGroupKms,
    infalls,
    smoothKms,
    collapsedOn: index < 0 ? null : attractors[index]!.name,
    cosmicKms: index < 0 ? smoothKms : attractors[index]!.velocityLgKms,
  };
}
