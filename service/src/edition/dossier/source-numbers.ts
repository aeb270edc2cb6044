import { formatDeclination, formatRightAscension } from '@eremite/shared/science/sky/sexagesimal-format';
import { withError } from '../columns/round-by-error.ts';
import type { DossierSource } from './dossier-input.ts';

const figure = (value: number | null, decimals: number, unit = ''): string =>
  value === null || !Number.isFinite(value) ? 'not known' : `${value.toFixed(decimals)}${unit ? ` ${unit}` : ''}`;

/** The numbers of a page, with errors and units; rounded as the exported tables are. */
export function sourceNumbers({ detail, priority }: DossierSource): [name: string, value: string][] {
  const { verdict, distance, positionError, beamArcsec, searchRadiusArcsec, aloneFactors } = detail;
  const { robustness } = verdict;
  const d = withError(verdict.distanceMpc, verdict.distanceErrorMpc);
  const massError =
    verdict.distanceMpc && verdict.distanceErrorMpc !== null
      ? ` ± ${((2 * verdict.distanceErrorMpc) / (verdict.distanceMpc * Math.LN10)).toFixed(2)}`
      : '';
  const share = (value: number | null, interval: readonly [number, number] | null) =>
    value === null
      ? 'not drawn'
      : `${(100 * value).toFixed(1)} %${interval ? ` (${(100 * interval[0]).toFixed(1)} to ${(100 * interval[1]).toFixed(1)})` : ''}`;
  return [
    ['Position (ICRS)', `${formatRightAscension(verdict.raDeg, 1)} ${formatDeclination(verdict.decDeg, 0)}`],
    ['', `${verdict.raDeg.toFixed(5)} ${verdict.decDeg.toFixed(5)} deg`],
    [
      'Position error',
      `${positionError.majorArcsec.toFixed(1)} × ${positionError.minorArcsec.toFixed(1)} arcsec, 1 sigma`,
    ],
    ['Beam', beamArcsec ? `${beamArcsec.major} × ${beamArcsec.minor} arcsec` : 'not stated'],
    ['Search radius', `${searchRadiusArcsec.toFixed(1)} arcsec`],
    ['cz, barycentric', figure(verdict.velocityKms, 1, 'km/s')],
    ['W50', figure(verdict.width50Kms, 1, 'km/s')],
    ['HI flux', figure(verdict.fluxJyKms, 3, 'Jy km/s')],
    ['S/N', figure(verdict.signalToNoise, 1)],
    ['Distance', d === null ? 'none usable' : `${d} Mpc (${distance.kind})`],
    ['log M_HI', verdict.logHiMass === null ? 'not known' : `${verdict.logHiMass.toFixed(2)}${massError} (solar)`],
    [
      'M_HI/L',
      verdict.gasToLight === null
        ? 'not known'
        : `${verdict.gasToLightIsLimit ? '> ' : ''}${Number(verdict.gasToLight.toPrecision(3))} solar`,
    ],
    ['P(none)', figure(verdict.pNone, 4)],
    ['P(missed)', figure(verdict.pMissed, 4)],
    ['P(spurious)', figure(verdict.pSpurious, 4)],
    ['Power of the silence', figure(verdict.power, 4)],
    [
      'Best object',
      verdict.counterpart
        ? `${verdict.counterpart.name}, P ${verdict.counterpart.probability.toFixed(4)}, ${verdict.counterpart.separationArcsec.toFixed(1)} arcsec`
        : 'none',
    ],
    ['P(no neighbour)', figure(verdict.pAlone, 4)],
    [
      '  its factors',
      aloneFactors
        ? `known ${aloneFactors.noneKnown.toFixed(3)} × unseen ${aloneFactors.noneUnseen.toFixed(3)} × covered ${aloneFactors.covered.toFixed(3)}`
        : 'not known',
    ],
    [
      'Nearest neighbour',
      verdict.nearest
        ? `${verdict.nearest.name}, ${verdict.nearest.separationKpc.toFixed(1)} kpc, ${verdict.nearest.velocityDifferenceKms.toFixed(0)} km/s`
        : 'none known',
    ],
    ['Starlight stands in', share(robustness?.starlightStability ?? null, robustness?.starlightInterval ?? null)],
    [
      'Surroundings stand in',
      share(robustness?.surroundingsStability ?? null, robustness?.surroundingsInterval ?? null),
    ],
    ['Priority', priority.toFixed(4)],
  ];
}
