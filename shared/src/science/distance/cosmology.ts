import { SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Flat ΛCDM without radiation: H₀ in km/s/Mpc and Ω_m; Ω_Λ = 1 - Ω_m. */
export interface Cosmology {
  readonly h0: number;
  readonly omegaM: number;
}

/** Abscissae and weights of ten-point Gauss-Legendre quadrature (positive half). Abramowitz & Stegun, table 25.4. */
const NODES = [0.1488743389816312, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717];
const WEIGHTS = [0.2955242247147529, 0.2692667193099964, 0.219086362515982, 0.1494513491505806, 0.0666713443086881];

function assertCosmology({ h0, omegaM }: Cosmology): void {
  if (!(h0 > 0 && h0 < Infinity && omegaM >= 0 && omegaM <= 1)) {
    throw new DomainError(`cosmology: expected h0 > 0 and 0 <= omegaM <= 1, got h0 ${h0} and omegaM ${omegaM}`);
  }
}

/** E(z) = H(z)/H₀ as a function of 1 + z. */
function expansion(onePlusZ: number, omegaM: number): number {
  return Math.sqrt(omegaM * onePlusZ ** 3 + 1 - omegaM);
}

/**
 * Comoving distance, (c/H₀) ∫ dz'/E(z').
 *
 * @param z cosmological redshift, 0 <= z <= 1100
 * @param cosmology flat ΛCDM
 * @returns Mpc, within 1e-10 relative of adaptive quadrature
 * @throws {DomainError} for a redshift or cosmology out of range
 *
 * Source: Hogg (1999), astro-ph/9905116, equation 15 (flat).
 */
export function comovingDistance(z: number, cosmology: Cosmology): number {
  assertCosmology(cosmology);
  if (!(z >= 0 && z <= 1100)) throw new DomainError(`comovingDistance: expected 0 <= z <= 1100, got ${z}`);
  // In u = ln(1+z) the integrand is smooth over any range: panels of at most 0.35 suffice.
  const end = Math.log1p(z);
  const panels = Math.max(1, Math.ceil(end / 0.35));
  const half = end / panels / 2;
  let sum = 0;
  for (let panel = 0; panel < panels; panel++) {
    const middle = (2 * panel + 1) * half;
    for (let i = 0; i < NODES.length; i++) {
      const low = Math.exp(middle - half * NODES[i]!);
      const high = Math.exp(middle + half * NODES[i]!);
      sum += WEIGHTS[i]! * (low / expansion(low, cosmology.omegaM) + high / expansion(high, cosmology.omegaM));
    }
  }
  return (SPEED_OF_LIGHT_KMS / cosmology.h0) * half * sum;
}

/**
 * Luminosity distance, (1+z) D_C.
 *
 * @param z cosmological redshift
 * @param cosmology flat ΛCDM
 * @param observedZ redshift as observed, where a peculiar velocity was taken off `z`: D_L = (1+z_obs) D_C(z)
 * @returns Mpc
 * @throws {DomainError} for a redshift or cosmology out of range
 *
 * Source: Hogg (1999); with two redshifts Davis et al. (2011), ApJ 741, 67 (form, from memory).
 *
 * Method: distance.
 */
export function luminosityDistance(z: number, cosmology: Cosmology, observedZ = z): number {
  if (!(observedZ > -1)) throw new DomainError(`luminosityDistance: expected an observed z above -1, got ${observedZ}`);
  return (1 + observedZ) * comovingDistance(z, cosmology);
}

/**
 * Angular-diameter distance, D_C/(1+z).
 *
 * @param z cosmological redshift
 * @param cosmology flat ΛCDM
 * @param observedZ redshift as observed, where a peculiar velocity was taken off `z`
 * @returns Mpc; D_L/D_A = (1+z_obs)²
 * @throws {DomainError} for a redshift or cosmology out of range
 *
 * Source: as {@link luminosityDistance}.
 */
export function angularDiameterDistance(z: number, cosmology: Cosmology, observedZ = z): number {
  if (!(observedZ > -1)) throw new DomainError(`angularDiameterDistance: expected z above -1, got ${observedZ}`);
  return comovingDistance(z, cosmology) / (1 + observedZ);
}

/** Newton's iteration on a monotonic distance; `slope` is its derivative with respect to z. */
function invert(target: number, start: number, at: (z: number) => number, slope: (z: number) => number): number {
  let z = start;
  for (let i = 0; i < 50; i++) {
    const step = (at(z) - target) / slope(z);
    const next = Math.min(1100, Math.max(z / 10, z - step));
    if (Math.abs(next - z) <= 1e-14 * (1 + next)) return next;
    z = next;
  }
  return z;
}

/**
 * Redshift of a comoving distance, the inverse of {@link comovingDistance}.
 *
 * @param distanceMpc Mpc, >= 0
 * @throws {DomainError} for a distance that is negative or beyond z = 1100
 */
export function redshiftAtComovingDistance(distanceMpc: number, cosmology: Cosmology): number {
  assertReachable('redshiftAtComovingDistance', distanceMpc, comovingDistance(1100, cosmology));
  const hubble = SPEED_OF_LIGHT_KMS / cosmology.h0;
  return invert(
    distanceMpc,
    distanceMpc / hubble,
    (z) => comovingDistance(z, cosmology),
    (z) => hubble / expansion(1 + z, cosmology.omegaM),
  );
}

/**
 * Redshift of a luminosity distance, the inverse of {@link luminosityDistance}.
 *
 * @param distanceMpc Mpc, >= 0
 * @throws {DomainError} for a distance that is negative or beyond z = 1100
 */
export function redshiftAtLuminosityDistance(distanceMpc: number, cosmology: Cosmology): number {
  assertReachable('redshiftAtLuminosityDistance', distanceMpc, luminosityDistance(1100, cosmology));
  const hubble = SPEED_OF_LIGHT_KMS / cosmology.h0;
  return invert(
    distanceMpc,
    Math.min(1000, distanceMpc / hubble),
    (z) => luminosityDistance(z, cosmology),
    (z) => comovingDistance(z, cosmology) + ((1 + z) * hubble) / expansion(1 + z, cosmology.omegaM),
  );
}

function assertReachable(where: string, distanceMpc: number, farthest: number): void {
  if (!(distanceMpc >= 0 && distanceMpc <= farthest)) {
    throw new DomainError(`${where}: expected a distance of 0 to ${farthest} Mpc, got ${distanceMpc}`);
  }
}

/** Second-order luminosity distance (cz/H₀)[1 + ½(1-q₀)z], Mpc; good to 0.01 per cent at z = 0.02. For comparison. */
export function luminosityDistanceSecondOrder(z: number, { h0, omegaM }: Cosmology): number {
  const deceleration = 1.5 * omegaM - 1;
  return ((SPEED_OF_LIGHT_KMS * z) / h0) * (1 + ((1 - deceleration) * z) / 2);
}

/** Distance modulus 5 log₁₀(D_L / 10 pc), mag. @throws {DomainError} unless the distance is positive */
export function distanceModulus(luminosityMpc: number): number {
  if (!(luminosityMpc > 0 && luminosityMpc < Infinity)) {
    throw new DomainError(`distanceModulus: expected a positive distance, got ${luminosityMpc} Mpc`);
  }
  return 5 * Math.log10(luminosityMpc) + 25;
}
