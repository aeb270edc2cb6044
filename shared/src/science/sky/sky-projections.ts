/** Point of the projection plane, radians: x grows with longitude at the reference point, y with latitude. */
export interface PlanePoint {
  readonly x: number;
  readonly y: number;
}

/** Native spherical coordinates of a projection, radians. */
export interface NativePoint {
  readonly phi: number;
  readonly theta: number;
}

/** A projection of the sphere with its parameters PV2_m applied. Undefined: no such point. */
export interface SkyProjection {
  /** Native latitude of the reference point, radians. */
  readonly theta0: number;
  project(phi: number, theta: number): PlanePoint | undefined;
  unproject(x: number, y: number): NativePoint | undefined;
}

const QUARTER = Math.PI / 2;

/** Projections whose radius depends on the native latitude alone. */
function zenithal(
  radiusOf: (colatitude: number) => number | undefined,
  colatitudeOf: (radius: number) => number | undefined,
): SkyProjection {
  return {
    theta0: QUARTER,
    project(phi, theta) {
      const r = radiusOf(QUARTER - theta);
      return r === undefined ? undefined : { x: r * Math.sin(phi), y: -r * Math.cos(phi) };
    },
    unproject(x, y) {
      const colatitude = colatitudeOf(Math.hypot(x, y));
      if (colatitude === undefined) return undefined;
      return { phi: x === 0 && y === 0 ? 0 : Math.atan2(x, -y), theta: QUARTER - colatitude };
    },
  };
}

/** Orthographic, slanted by `xi` and `eta` as interferometers need (equation 39 and 40). */
function orthographic(xi: number, eta: number): SkyProjection {
  return {
    theta0: QUARTER,
    project(phi, theta) {
      if (theta < 0) return undefined;
      // 1 - sin θ without the loss of digits near the reference point.
      const fall = 2 * Math.sin((QUARTER - theta) / 2) ** 2;
      return { x: Math.cos(theta) * Math.sin(phi) + xi * fall, y: -Math.cos(theta) * Math.cos(phi) + eta * fall };
    },
    unproject(x, y) {
      const a = xi * xi + eta * eta + 1;
      const b = xi * (x - xi) + eta * (y - eta);
      const c = (x - xi) ** 2 + (y - eta) ** 2 - 1;
      const root = b * b - a * c;
      if (!(root >= 0)) return undefined;
      const sine = Math.min(1, (-b + Math.sqrt(root)) / a);
      if (sine < 0) return undefined;
      const across = x - xi * (1 - sine);
      const along = -(y - eta * (1 - sine));
      return { phi: Math.atan2(across, along), theta: Math.atan2(sine, Math.hypot(across, along)) };
    },
  };
}

/** Projections on a cylinder touching the native equator: x is the native longitude. */
function cylindrical(rise: (theta: number) => number, latitude: (y: number) => number): SkyProjection {
  return {
    theta0: 0,
    project: (phi, theta) => {
      const y = rise(theta);
      return Number.isFinite(y) ? { x: phi, y } : undefined;
    },
    unproject: (x, y) => {
      const theta = latitude(y);
      return Math.abs(x) <= Math.PI * (1 + 1e-12) && Math.abs(theta) <= QUARTER ? { phi: x, theta } : undefined;
    },
  };
}

const SANSON_FLAMSTEED: SkyProjection = {
  theta0: 0,
  project: (phi, theta) => ({ x: phi * Math.cos(theta), y: theta }),
  unproject(x, y) {
    if (Math.abs(y) > QUARTER) return undefined;
    const phi = x === 0 ? 0 : x / Math.cos(y);
    return Math.abs(phi) <= Math.PI * (1 + 1e-12) ? { phi, theta: y } : undefined;
  },
};

const HAMMER_AITOFF: SkyProjection = {
  theta0: 0,
  project(phi, theta) {
    const gamma = Math.sqrt(2 / (1 + Math.cos(theta) * Math.cos(phi / 2)));
    return { x: 2 * gamma * Math.cos(theta) * Math.sin(phi / 2), y: gamma * Math.sin(theta) };
  },
  unproject(x, y) {
    const squared = 1 - (x / 4) ** 2 - (y / 2) ** 2;
    if (squared < 0.5 - 1e-12) return undefined;
    const z = Math.sqrt(squared);
    const sine = y * z;
    const cosine = Math.hypot(2 * squared - 1, (z * x) / 2);
    return { phi: 2 * Math.atan2((z * x) / 2, 2 * squared - 1), theta: Math.atan2(sine, cosine) };
  },
};

/** Codes of the projections offered, as in CTYPE. */
export const PROJECTION_CODES = ['TAN', 'SIN', 'ARC', 'STG', 'ZEA', 'CAR', 'CEA', 'MER', 'SFL', 'AIT'] as const;
export type ProjectionCode = (typeof PROJECTION_CODES)[number];

/**
 * A projection by its code.
 *
 * @param parameters PV2_1, PV2_2, ... in that order, as in the header (SIN: slant; CEA: λ)
 *
 * Source: Calabretta & Greisen (2002), A&A 395, 1077, sections 5.1 to 5.3; plane coordinates here in radians.
 */
export function skyProjection(code: ProjectionCode, parameters: readonly number[] = []): SkyProjection {
  const [first, second] = parameters;
  switch (code) {
    case 'TAN':
      return zenithal((c) => (c < QUARTER - 1e-15 ? Math.tan(c) : undefined), Math.atan);
    case 'SIN':
      return orthographic(first ?? 0, second ?? 0);
    case 'ARC':
      return zenithal(
        (c) => c,
        (r) => (r <= Math.PI ? r : undefined),
      );
    case 'STG':
      return zenithal(
        (c) => (c < Math.PI - 1e-12 ? 2 * Math.tan(c / 2) : undefined),
        (r) => 2 * Math.atan(r / 2),
      );
    case 'ZEA':
      return zenithal(
        (c) => 2 * Math.sin(c / 2),
        (r) => (r <= 2 ? 2 * Math.asin(r / 2) : undefined),
      );
    case 'CAR':
      return cylindrical(
        (theta) => theta,
        (y) => y,
      );
    case 'CEA': {
      const lambda = first ?? 1;
      return cylindrical(
        (theta) => Math.sin(theta) / lambda,
        (y) => Math.asin(y * lambda),
      );
    }
    case 'MER':
      return cylindrical(
        (theta) => Math.log(Math.tan(Math.PI / 4 + theta / 2)),
        (y) => 2 * Math.atan(Math.exp(y)) - QUARTER,
      );
    case 'SFL':
      return SANSON_FLAMSTEED;
    case 'AIT':
      return HAMMER_AITOFF;
  }
}
