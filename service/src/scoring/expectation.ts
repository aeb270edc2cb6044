import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { CounterpartMagnitudes } from '@eremite/shared/science/counterpart/magnitude-term';
import {
  expectedCounterpart,
  expectedCounterpartFromFlux,
  type ExpectedCounterpart,
} from '@eremite/shared/science/hydrogen/expected-counterpart';
import { DEFAULT_GAS_STAR_RELATION, type GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import type { BandId } from '@eremite/shared/science/photometry/bands';
import type { SizePrior } from '@eremite/shared/science/photometry/size-prior';
import type { Detection } from './detection-table.ts';
import type { PreparedBand } from './prepared-catalogue.ts';

/** Gas mass taken for a detection without a flux, log10 solar masses, and the scatter that goes with not knowing. */
const UNKNOWN_FLUX = { logHiMass: 9, scatterMag: 3, fluxJyKms: 1 };

/** The relation of stars to gas that the criteria ask for. */
export function relationOf({ counterpart }: CriteriaSettings): GasStarRelation {
  return {
    ...DEFAULT_GAS_STAR_RELATION,
    slope: counterpart.relationSlope,
    pivotLogStellar: counterpart.relationIntercept,
    scatterAtPivotMag: counterpart.relationScatterMag,
    tailFraction: counterpart.relationTail,
    massToLightR: counterpart.massToLightR,
  };
}

/** What the ordinary counterpart of a detection should look like in a band of a table, in the table's own system. */
export interface BandExpectation extends CounterpartMagnitudes {
  sizes: SizePrior;
  basis: ExpectedCounterpart['basis'] | 'unknown flux';
  extinctionMag: number;
}

/** What differs from the nominal case in a draw of the robustness test. */
export interface Perturbation {
  /** Distance over the nominal one. */
  distanceFactor: number;
  fluxFactor: number;
  /** Added to the expected magnitude: error of the relation, of mass-to-light. */
  magnitudeShift: number;
  reddeningFactor: number;
}
export const NOMINAL: Perturbation = { distanceFactor: 1, fluxFactor: 1, magnitudeShift: 0, reddeningFactor: 1 };

/** @returns undefined where the light of the band cannot be predicted */
export function expectIn(
  detection: Detection,
  band: Pick<PreparedBand, 'id' | 'toAb' | 'extinction'>,
  relation: GasStarRelation,
  perturbed: Perturbation = NOMINAL,
): BandExpectation | undefined {
  if (!band.id) return undefined;
  const reddened = band.extinction !== 'already-corrected' && detection.ebvMag > 0;
  const ebv = reddened ? detection.ebvMag * perturbed.reddeningFactor : 0;
  const { expected, scatterMag, basis } = expectAb(detection, band.id, ebv, relation, perturbed);
  if (!expected) return undefined;
  const clear = ebv > 0 ? expectAb(detection, band.id, 0, relation, perturbed).expected! : expected;
  return {
    magnitude: expected.magnitudeAb - band.toAb + perturbed.magnitudeShift,
    scatterMag,
    tailFraction: expected.tailFraction,
    tailScatterMag: Math.max(expected.tailScatterMag, scatterMag),
    sizes: expected.radiusArcsec,
    basis,
    extinctionMag: expected.magnitudeAb - clear.magnitudeAb,
  };
}

function expectAb(
  detection: Detection,
  id: BandId,
  ebv: number,
  relation: GasStarRelation,
  perturbed: Perturbation,
): { expected?: ExpectedCounterpart; scatterMag: number; basis: BandExpectation['basis'] } {
  const { logHiMass, luminosityMpc, fluxJyKms } = detection;
  const settings = { relation };
  const distance = luminosityMpc * perturbed.distanceFactor;
  const hasFlux = fluxJyKms > 0;
  const result =
    distance > 0
      ? expectedCounterpart(
          hasFlux
            ? logHiMass + Math.log10(perturbed.fluxFactor * perturbed.distanceFactor ** 2)
            : UNKNOWN_FLUX.logHiMass,
          distance,
          id,
          ebv,
          settings,
        )
      : expectedCounterpartFromFlux(
          hasFlux ? fluxJyKms * perturbed.fluxFactor : UNKNOWN_FLUX.fluxJyKms,
          id,
          ebv,
          settings,
        );
  if (result.kind === 'not predicted') return { scatterMag: NaN, basis: 'unknown flux' };
  if (hasFlux) return { expected: result, scatterMag: result.scatterMag, basis: result.basis };
  return {
    expected: result,
    scatterMag: Math.hypot(result.scatterMag, UNKNOWN_FLUX.scatterMag),
    basis: 'unknown flux',
  };
}
