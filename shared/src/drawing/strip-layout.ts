import type { SkyMark } from './sky-mark.ts';
import type { StripZones } from './strip-zones.ts';

/** Where a projected separation and a velocity difference stand on the strip, pixels. */
export interface StripLayout {
  width: number;
  height: number;
  left: number;
  right: number;
  top: number;
  /** Lower end of the velocity axis; the shelf is below it. */
  floor: number;
  shelfY: number;
  fromKpc: number;
  toKpc: number;
  reachKms: number;
  zones: StripZones;
  /** @param kpc projected separation, kpc; clamped to the strip */
  x: (kpc: number) => number;
  /** @param kms velocity difference, km/s; clamped to the strip */
  y: (kms: number) => number;
  /** Marks as far out as the strip reaches. */
  placed: PlacedMark[];
}

/** A mark with its place, and how its velocity is shown. */
export interface PlacedMark {
  mark: SkyMark;
  kpc: number;
  x: number;
  y: number;
  /** `above` and `below`: faster or slower than the strip reaches; `shelf`: without a velocity. */
  where: 'inside' | 'above' | 'below' | 'shelf';
}

const MARGIN = { left: 56, right: 14, top: 28, bottom: 46 };
const FROM_KPC = 1;
const LEAST_TO_KPC = 1500;

/**
 * Places marks by projected separation (logarithmic) and velocity difference (linear).
 *
 * @param zones edges at the distance to draw for; separations follow from angles at that distance
 */
export function stripLayout(
  marks: readonly SkyMark[],
  zones: StripZones,
  { width = 560, height = 210 }: { width?: number; height?: number } = {},
): StripLayout {
  const toKpc = Math.max(LEAST_TO_KPC, zones.neighbourKpc * 1.6);
  const reachKms = 1.35 * Math.max(zones.neighbourKms, zones.debrisKms, zones.possibleDebrisKms);
  const across = width - MARGIN.left - MARGIN.right;
  const floor = height - MARGIN.bottom;
  const down = floor - MARGIN.top;
  const span = Math.log10(toKpc / FROM_KPC);
  const clamp = (share: number) => Math.min(1, Math.max(0, share));
  const x = (kpc: number) => MARGIN.left + across * clamp(Math.log10(Math.max(kpc, 1e-6) / FROM_KPC) / span);
  const y = (kms: number) => MARGIN.top + down * (1 - clamp((kms + reachKms) / (2 * reachKms)));
  const shelfY = floor + 10;
  const placed = marks.flatMap((mark): PlacedMark[] => {
    const kpc = mark.separationArcsec * zones.kpcPerArcsec;
    if (kpc > toKpc) return [];
    const dv = mark.velocityDifferenceKms;
    const where = dv === null ? 'shelf' : dv > reachKms ? 'above' : dv < -reachKms ? 'below' : 'inside';
    return [{ mark, kpc, x: x(kpc), y: dv === null ? shelfY : y(dv), where }];
  });
  return {
    width,
    height,
    left: MARGIN.left,
    right: width - MARGIN.right,
    top: MARGIN.top,
    floor,
    shelfY,
    fromKpc: FROM_KPC,
    toKpc,
    reachKms,
    zones,
    x,
    y,
    placed,
  };
}
