import { z } from 'zod';

const nullable = z.number().nullable();

/** Measures of the surroundings at the distance of the gas, beside the verdict; each galaxy counts once. */
export const surroundingsMeasures = z.object({
  /** How far the measures look, Mpc. */
  radiusMpc: z.number(),
  /** Nearest galaxy within 500 km/s; a lower limit where the edge of the redshifts is nearer. */
  nearest: z
    .object({ name: z.string(), separationKpc: z.number(), velocityDifferenceKms: z.number(), isLimit: z.boolean() })
    .nullable(),
  /** Galaxies within 500 km/s inside some radii. */
  counts: z.array(z.object({ radiusMpc: z.number(), count: z.int() })),
  /** Faintest M_r that the two densities count. */
  brighterThanMag: z.number(),
  /** Sigma_5, per square Mpc, within 1000 km/s; an upper limit with fewer than five. */
  fifthDensity: z.number(),
  fifthDensityIsLimit: z.boolean(),
  /** eta_5 of the same galaxies, isolated below 2.4; an upper limit where the density is. */
  localDensity: z.number(),
  /** Theta_1 and Theta_5: isolated below 0; upper bounds, since separations are projected. */
  tidalIndex: nullable,
  tidalIndexOfFive: nullable,
  disturber: z.string().nullable(),
  /** Q: isolated below -2. */
  tidalStrength: nullable,
  /** Galaxies of like size nearer than twenty of their diameters, with a redshift or without. */
  spoilers: z.int().nullable(),
  group: z
    .object({
      name: z.string(),
      separationKpc: z.number(),
      velocityDifferenceKms: z.number(),
      r200Kpc: z.number(),
    })
    .nullable(),
  /** HI detections within 1 Mpc and 500 km/s. */
  gasNeighbours: z.int(),
  /** Neighbours that redshifts do not reach, expected in the mean field and with clustering. */
  unseen: z.object({ meanField: z.number(), clustered: z.number() }).nullable(),
  /** M_r that redshifts reach here. */
  reachesMag: nullable,
  covered: nullable,
  /** Nearest edge of the redshifts, kpc; null where it lies outside the neighbour circle. */
  edgeKpc: nullable,
  /** Galaxies without a redshift within two beams, bright enough to count if they were there. */
  unverified: z.int().nullable(),
});
export type SurroundingsMeasures = z.output<typeof surroundingsMeasures>;
