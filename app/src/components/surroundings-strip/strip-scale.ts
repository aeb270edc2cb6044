/** Where a projected separation and a velocity difference stand on the strip. */
export interface StripScale {
  width: number;
  height: number;
  /** @param kpc projected separation, kpc; clamped to the strip */
  x: (kpc: number) => number;
  /** @param kms velocity difference, km/s; clamped to the strip */
  y: (kms: number) => number;
}

export const STRIP_MARGIN = { left: 52, right: 14, top: 10, bottom: 42 };

/**
 * Logarithmic in separation, linear in velocity.
 * @param fromKpc smallest separation shown, kpc
 * @param toKpc largest separation shown, kpc
 * @param reachKms largest velocity difference shown, km/s
 */
export function stripScale(
  width: number,
  height: number,
  fromKpc: number,
  toKpc: number,
  reachKms: number,
): StripScale {
  const { left, right, top, bottom } = STRIP_MARGIN;
  const low = Math.log10(fromKpc);
  const span = Math.log10(toKpc) - low;
  const across = width - left - right;
  const down = height - top - bottom;
  const clamp = (share: number) => Math.min(1, Math.max(0, share));
  return {
    width,
    height,
    x: (kpc) => left + across * clamp((Math.log10(Math.max(kpc, 1e-6)) - low) / span),
    y: (kms) => top + down * (1 - clamp((kms + reachKms) / (2 * reachKms))),
  };
}
