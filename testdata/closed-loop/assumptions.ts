/** What a closed-loop universe is made with. The defaults are what the scoring assumes; the rest breaks it on purpose. */
export interface Assumptions {
  seed: number;
  detections: number;
  /** Side of the square field, degrees. */
  sideDeg: number;
  /** Share of detections that have no stars at all. */
  darkShare: number;
  /** Mean number of unrelated galaxies at the gas velocity within 300 kpc of a detection. */
  companions: number;
  /** Share of counterparts that the catalogue holds as faint pieces only. */
  shreddedShare: number;
  /** True depth less the stated one, mag. */
  depthErrorMag: number;
  /** True centroid errors over those the list implies. */
  centroidFactor: number;
}

/** As the scoring assumes, but for companions: some clustering is always there. */
export const FAIR: Assumptions = {
  seed: 20_261_203,
  detections: 1500,
  sideDeg: 9,
  darkShare: 0.02,
  companions: 0.3,
  shreddedShare: 0,
  depthErrorMag: 0,
  centroidFactor: 1,
};

/** One assumption broken at a time. */
export const BROKEN: Readonly<Record<string, Partial<Assumptions>>> = {
  'clustered field': { companions: 4 },
  'one galaxy in ten shredded': { shreddedShare: 0.1 },
  'depth overstated by 0.5 mag': { depthErrorMag: -0.5 },
  'depth understated by 0.5 mag': { depthErrorMag: 0.5 },
  'centroid errors twice as large': { centroidFactor: 2 },
};
