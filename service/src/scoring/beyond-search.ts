import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Ground } from '@eremite/shared/contracts/verdict';
import { hiDiameterArcmin } from '@eremite/shared/science/hydrogen/hi-size';
import { arcsec, signedKms } from './figures.ts';
import { isStar, rowName } from './prepared-catalogue.ts';
import type { Assessment } from './scored-detection.ts';
import { velocityScatterOf } from './weigh-objects.ts';

/** How far out a galaxy at the velocity of the gas is told of, in search radii. Our choice. */
const REACH = 2;
const MOST_TOLD = 2;

/**
 * Galaxies at the velocity of the gas just outside the search radius, or inside the disc that so much gas should have.
 * They are no candidates, yet where no counterpart is found each may be the galaxy whose gas this is: a position error that
 * is too small shows in this way.
 */
export function beyondSearch(
  { detection, dominating, surroundings }: Assessment,
  criteria: CriteriaSettings,
): Ground[] {
  if (dominating) return [];
  const { searchArcsec, logHiMass, angularMpc } = detection;
  const discArcsec = Number.isNaN(logHiMass) ? 0 : 30 * hiDiameterArcmin(logHiMass, angularMpc);
  const reach = Math.max(REACH * searchArcsec, discArcsec);
  const scatter = 3 * velocityScatterOf(detection, criteria);
  return surroundings.pool
    .filter(
      ({ catalogue, index, separationArcsec, velocityDifferenceKms }) =>
        catalogue.input.kind !== 'hi' &&
        !isStar(catalogue, index) &&
        separationArcsec > searchArcsec &&
        separationArcsec <= reach &&
        Math.abs(velocityDifferenceKms) <= scatter,
    )
    .slice(0, MOST_TOLD)
    .map(({ catalogue, index, separationArcsec, velocityDifferenceKms }) => {
      const disc =
        separationArcsec <= discArcsec
          ? `, yet inside the disc to be expected of so much gas (radius ${arcsec(discArcsec)})`
          : '';
      return {
        about: 'starlight',
        weight: 'against',
        text: `${rowName(catalogue, index)} (${catalogue.input.name}) has the velocity of the gas (${signedKms(velocityDifferenceKms)}) and lies ${arcsec(separationArcsec)} away, outside the search radius of ${arcsec(searchArcsec)}${disc}: check the position error.`,
        method: 'position',
      };
    });
}
