import { DomainError } from '../domain-error.ts';

/** Ratio of full width at half maximum to standard deviation of a Gaussian, √(8 ln 2). */
const FWHM_PER_SIGMA = Math.sqrt(8 * Math.LN2);

function assertWidth(where: string, ...values: readonly number[]): void {
  if (!values.every((v) => v >= 0 && v < Infinity)) {
    throw new DomainError(`${where}: expected widths of 0 km/s or more, got ${values.join(', ')}`);
  }
}

/**
 * Width freed of the instrument and of the stretch by redshift, W = (W_obs - 2 Δv λ)/(1+z).
 *
 * @param observedKms observed width, km/s
 * @param channelKms channel separation Δv, km/s
 * @param z redshift
 * @param broadening λ, without unit; 0.3 to 0.5, growing with S/N
 * @returns km/s, never below 0
 * @throws {DomainError} for negative widths or z <= -1
 *
 * Source: Springob et al. (2005), ApJS 160, 149 (from memory).
 */
export function withoutInstrument(observedKms: number, channelKms: number, z: number, broadening = 0.4): number {
  assertWidth('withoutInstrument', observedKms, channelKms, broadening);
  if (!(z > -1)) throw new DomainError(`withoutInstrument: expected z above -1, got ${z}`);
  return Math.max(0, (observedKms - 2 * channelKms * broadening) / (1 + z));
}

/**
 * Width less the linear turbulence term.
 *
 * @param widthKms width free of the instrument, km/s
 * @param turbulenceKms usually 6.5 km/s
 * @returns km/s, never below 0
 * @throws {DomainError} for negative widths
 *
 * Source: Springob et al. (2005), ApJS 160, 149 (from memory).
 */
export function withoutLinearTurbulence(widthKms: number, turbulenceKms = 6.5): number {
  assertWidth('withoutLinearTurbulence', widthKms, turbulenceKms);
  return Math.max(0, widthKms - turbulenceKms);
}

/**
 * Width at no velocity resolution by the linear rule W(0) = W(R) + (0.014 l - 0.83) R.
 *
 * @param widthKms observed width, km/s
 * @param resolutionKms velocity resolution R, km/s
 * @param levelPerCent level of the width, 20 or 50 per cent of the peak
 * @returns km/s, never below 0
 * @throws {DomainError} for negative widths or another level
 *
 * Source: Bottinelli et al. (1990), A&AS 82, 391 (from memory).
 */
export function withoutResolutionLinear(widthKms: number, resolutionKms: number, levelPerCent: 20 | 50): number {
  assertWidth('withoutResolutionLinear', widthKms, resolutionKms);
  if (levelPerCent !== 20 && levelPerCent !== 50) {
    throw new DomainError(`withoutResolutionLinear: expected the level 20 or 50, got ${String(levelPerCent)}`);
  }
  return Math.max(0, widthKms + (0.014 * levelPerCent - 0.83) * resolutionKms);
}

/**
 * Width of a Gaussian line at no velocity resolution, √(W² - R²).
 *
 * @param widthKms observed full width at half maximum, km/s
 * @param resolutionKms full width of the channel response, km/s
 * @returns km/s; 0 for a line no wider than the response (unresolved)
 * @throws {DomainError} for negative widths
 *
 * Source: convolution of Gaussians.
 */
export function withoutResolutionGaussian(widthKms: number, resolutionKms: number): number {
  assertWidth('withoutResolutionGaussian', widthKms, resolutionKms);
  return Math.sqrt(Math.max(0, (widthKms - resolutionKms) * (widthKms + resolutionKms)));
}

/** Turbulent width W_t and transition width W_c, km/s, for {@link withoutTurbulence}. */
export const TURBULENCE = {
  /** W20. Source: Tully & Fouqué (1985), ApJS 58, 67. */
  tullyFouque20: { turbulentKms: 38, transitionKms: 120 },
  /** W20. Source: Verheijen & Sancisi (2001), A&A 370, 765. */
  verheijenSancisi20: { turbulentKms: 22, transitionKms: 120 },
  /** W50. Source: Verheijen & Sancisi (2001), A&A 370, 765. */
  verheijenSancisi50: { turbulentKms: 5, transitionKms: 100 },
} as const;

/**
 * Rotational width: quadratic subtraction of turbulence for narrow profiles, linear for wide ones.
 *
 * @param widthKms width free of the instrument, km/s
 * @param turbulence W_t and W_c, km/s
 * @returns km/s; 0 where turbulence alone explains the width
 * @throws {DomainError} for negative widths
 *
 * Source: Tully & Fouqué (1985), ApJS 58, 67, equation 12 (from memory).
 */
export function withoutTurbulence(
  widthKms: number,
  turbulence: { readonly turbulentKms: number; readonly transitionKms: number },
): number {
  assertWidth('withoutTurbulence', widthKms, turbulence.turbulentKms, turbulence.transitionKms);
  const t = turbulence.turbulentKms;
  const fade = Math.exp(-((widthKms / turbulence.transitionKms) ** 2));
  return Math.sqrt(Math.max(0, widthKms ** 2 + t ** 2 - 2 * widthKms * t * (1 - fade) - 2 * t ** 2 * fade));
}

/**
 * Velocity dispersion of a line without sign of rotation, W50/2.35482. Common practice below 25 to 30 km/s.
 *
 * @param width50Kms full width at half maximum, km/s
 * @throws {DomainError} for a negative width
 */
export function toDispersion(width50Kms: number): number {
  assertWidth('toDispersion', width50Kms);
  return width50Kms / FWHM_PER_SIGMA;
}
