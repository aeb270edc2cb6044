import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { angleOfKpc, projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { fixed, significant } from '#lib/format/number.ts';

/** An angle with the unit that suits it: `42″`, `7.3′`, `1.7°`. */
function angleWords(arcsec: number): string {
  if (arcsec < 100) return `${significant(arcsec, 2)}″`;
  return arcsec < 6000 ? `${significant(arcsec / 60, 2)}′` : `${significant(arcsec / 3600, 3)}°`;
}

const lengthWords = (kpc: number): string =>
  kpc < 1000 ? `${significant(kpc, 2)} kpc` : `${significant(kpc / 1000, 2)} Mpc`;

/**
 * What angles and windows of the criteria come to at one distance.
 *
 * @param angularMpc angular-diameter distance, Mpc, > 0
 * @param searchArcsec search radius in use, arcsec; undefined where none is known yet
 * @param h0 Hubble constant, km/s/Mpc
 */
export function scaleWords(
  { surroundings }: CriteriaSettings,
  angularMpc: number,
  searchArcsec: number | undefined,
  h0: number,
): string[] {
  const { radiusMpc, velocityWindowKms } = surroundings;
  return [
    ...(searchArcsec === undefined
      ? []
      : [
          `a search of ${significant(searchArcsec, 3)} arcsec is ${lengthWords(projectedKpc(searchArcsec, angularMpc))}`,
        ]),
    `${radiusMpc} Mpc of neighbourhood is ${angleWords(angleOfKpc(radiusMpc * 1000, angularMpc))}`,
    `${fixed(velocityWindowKms, 0)} km/s is ${significant(velocityWindowKms / h0, 2)} Mpc of Hubble flow, before and behind`,
  ];
}
