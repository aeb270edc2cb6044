import { DomainError } from '../domain-error.ts';

/**
 * Integrated flux at which a line of a given width reaches n sigma.
 *
 * @param rmsMjy noise of one channel, mJy
 * @param widthKms line width, km/s
 * @param channelKms channel width the noise refers to, km/s
 * @param sigmas significance wanted
 * @returns limiting flux, Jy km/s
 * @throws {DomainError} if an input is not positive
 *
 * White noise between channels; baseline ripple makes wide lines worse. Source: radiometer statistics, n sigma sqrt(W dv).
 */
export function fluxLimit(rmsMjy: number, widthKms: number, channelKms: number, sigmas: number): number {
  positive('fluxLimit', rmsMjy, widthKms, channelKms, sigmas);
  return (sigmas * rmsMjy * Math.sqrt(widthKms * channelKms)) / 1000;
}

/**
 * Signal-to-noise of an integrated line, smoothed to half its width.
 *
 * @param fluxJyKms integrated flux, Jy km/s
 * @param width50Kms width at half the peak, km/s
 * @param rmsMjy noise at 10 km/s resolution, mJy
 * @returns signal-to-noise ratio
 * @throws {DomainError} if an input is not positive
 *
 * Above 400 km/s the smoothing stays at 20 units of 10 km/s. Source: Haynes et al. (2011, 2018), from memory.
 */
export function lineSignalToNoise(fluxJyKms: number, width50Kms: number, rmsMjy: number): number {
  positive('lineSignalToNoise', fluxJyKms, width50Kms, rmsMjy);
  const smoothing = width50Kms < 400 ? width50Kms / 20 : 20;
  return (((1000 * fluxJyKms) / width50Kms) * Math.sqrt(smoothing)) / rmsMjy;
}

function positive(name: string, ...values: number[]): void {
  if (!values.every((x) => x > 0 && Number.isFinite(x))) {
    throw new DomainError(`${name}: every input must be positive, got ${values.join(', ')}`);
  }
}
