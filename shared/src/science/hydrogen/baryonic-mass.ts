import { DomainError } from '../domain-error.ts';

/** Gas mass over HI mass: helium alone. 1.36 (with metals) and 1.4 (with a guess at molecules) are also printed: state which. */
export const HELIUM_FACTOR = 1.33;

/** Masses in solar masses; `gasFraction` is gas over baryons. */
export interface BaryonicMass {
  gas: number;
  total: number;
  gasFraction: number;
}

/**
 * Mass of gas and stars together.
 *
 * @param hiMassSolar HI mass, solar masses, positive
 * @param stellarMassSolar stellar mass, solar masses, not negative (0 for a source without stars; a limit gives limits)
 * @param heliumFactor gas mass over HI mass, at least 1
 * @returns gas and total mass, solar masses, and the gas fraction
 * @throws {DomainError} if an input is out of range
 *
 * Source: definitions; molecules and ionised gas are left out.
 *
 * Method: hi-mass.
 */
export function baryonicMass(
  hiMassSolar: number,
  stellarMassSolar: number,
  heliumFactor = HELIUM_FACTOR,
): BaryonicMass {
  if (!(hiMassSolar > 0 && stellarMassSolar >= 0 && heliumFactor >= 1)) {
    throw new DomainError(`baryonicMass: got ${hiMassSolar}, ${stellarMassSolar}, helium factor ${heliumFactor}`);
  }
  const gas = heliumFactor * hiMassSolar;
  const total = gas + stellarMassSolar;
  return { gas, total, gasFraction: gas / total };
}
