/** A galaxy at the velocity of the gas inside the beam. */
export interface BeamMember {
  /** log10 of the HI mass its stars let expect; NaN where it has no magnitude. */
  logHiMass: number;
  /** Distance from the beam's centre in units of its FWHM in that direction. */
  beamOffset: number;
}

/**
 * Share of the detection's flux that each galaxy in the beam should give.
 *
 * @param members galaxies at the gas velocity
 * @returns shares that add to one, in the same order; a galaxy without a magnitude counts as the median of the others
 *
 * All lie at one distance, so the share goes as predicted mass times the response exp(-4 ln 2 theta^2 / FWHM^2).
 *
 * Method: confusion.
 */
export function expectedFluxShares(members: readonly BeamMember[]): number[] {
  const known = members.map((member) => member.logHiMass).filter((mass) => !Number.isNaN(mass));
  known.sort((a, b) => a - b);
  const median = known.length === 0 ? 0 : known[known.length >> 1]!;
  const fluxes = members.map(
    ({ logHiMass, beamOffset }) =>
      10 ** (Number.isNaN(logHiMass) ? median : logHiMass) * Math.exp(-4 * Math.LN2 * beamOffset ** 2),
  );
  const sum = fluxes.reduce((total, flux) => total + flux, 0);
  return fluxes.map((flux) => (sum > 0 ? flux / sum : 0));
}
