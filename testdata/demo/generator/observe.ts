import { FIELD, inside, moved } from './field.ts';
import { fluxOf, type Source } from './galaxy.ts';
import type { Random } from './random.ts';

export interface Detection {
  name: string;
  raDeg: number;
  decDeg: number;
  czKms: number;
  czErrorKms: number;
  width50Kms: number;
  fluxJyKms: number;
  fluxErrorJyKms: number;
  signalToNoise: number;
  reliability: number;
  story: string;
}

/** Matched-filter signal-to-noise: (1000 S/W50) sqrt(W50/20)/noise, noise in mJy at 10 km/s (form from memory). */
export function signalToNoise(fluxJyKms: number, widthKms: number): number {
  return ((1000 * fluxJyKms) / widthKms) * (Math.sqrt(widthKms / 20) / FIELD.channelNoiseMjy);
}

/** Label of the invented survey: truncated, not rounded. */
export function designation(raDeg: number, decDeg: number): string {
  const minutes = Math.floor((raDeg / 15) * 60 + 1e-9);
  const degrees = Math.floor(Math.abs(decDeg) * 60 + 1e-9);
  const two = (value: number): string => String(value).padStart(2, '0');
  return `HLY J${two(Math.floor(minutes / 60))}${two(minutes % 60)}${decDeg < 0 ? '-' : '+'}${two(Math.floor(degrees / 60))}${two(degrees % 60)}`;
}

/** What the HI survey lists: sources in (or just beyond) the strip over the limit; blends in one beam become one detection. */
export function detect(sources: readonly Source[], random: Random): Detection[] {
  const seen = sources.filter(
    (source) =>
      Number.isFinite(source.logHi) && (inside(source.raDeg, source.decDeg) || source.story === 'not covered'),
  );
  const taken = new Set<Source>();
  const detections: Detection[] = [];
  for (const source of [...seen].sort((a, b) => fluxOf(b) - fluxOf(a))) {
    if (taken.has(source)) continue;
    const blend = seen.filter(
      (other) =>
        !taken.has(other) &&
        Math.hypot((other.raDeg - source.raDeg) * 0.97, other.decDeg - source.decDeg) * 3600 < 0.6 * FIELD.beamArcsec &&
        Math.abs(other.czKms - source.czKms) < 150,
    );
    blend.forEach((member) => taken.add(member));
    const fluxes = blend.map(fluxOf);
    const flux = fluxes.reduce((sum, value) => sum + value, 0);
    const width = Math.hypot(source.width50Kms, blend.length > 1 ? 60 : 0);
    const snr = signalToNoise(flux, width) * (1 + random.normal(0, 0.03));
    const told = source.story !== 'field' && source.story !== 'gas-rich neighbour';
    if (snr < 6.2 && !told) continue;
    const mean = (value: (member: Source) => number): number =>
      blend.reduce((sum, member, i) => sum + value(member) * fluxes[i]!, 0) / flux;
    const sigma = Math.hypot((0.6 * FIELD.beamArcsec) / snr, 2);
    const tail = random.uniform() < 0.08 && !told ? 5 : 0;
    const [raDeg, decDeg] = moved(
      mean((member) => member.raDeg),
      mean((member) => member.decDeg),
      random.normal(0, Math.hypot(sigma, tail)),
      random.normal(0, Math.hypot(sigma, tail)),
    );
    const czError = Math.max(1.5, (0.5 * width) / snr);
    detections.push({
      name: designation(raDeg, decDeg),
      raDeg,
      decDeg,
      czKms: source.story === 'no velocity measured' ? NaN : mean((member) => member.czKms) + random.normal(0, czError),
      czErrorKms: czError,
      width50Kms: width * (1 + random.normal(0, 0.03)),
      fluxJyKms: flux * (1 + random.normal(0, 1 / snr)),
      fluxErrorJyKms: flux / snr,
      signalToNoise: snr,
      reliability: Math.min(0.999, 1 / (1 + Math.exp(-(snr - 4.6) / 0.55))),
      story: source.story,
    });
  }
  addSpurious(detections, random);
  detections.sort((a, b) => a.raDeg - b.raDeg);
  nameApart(detections);
  return detections;
}

/** Two lines that are noise: the list knows that it holds some. */
function addSpurious(detections: Detection[], random: Random): void {
  for (const [raDeg, decDeg, cz] of [
    [47.31, 14.62, 5210],
    [49.42, 13.57, 7744],
  ] as const) {
    const snr = 5.4;
    const width = 46;
    const flux = (snr * FIELD.channelNoiseMjy * width) / 1000 / Math.sqrt(width / 20);
    detections.push({
      name: designation(raDeg, decDeg),
      raDeg,
      decDeg,
      czKms: cz + random.normal(0, 3),
      czErrorKms: 6,
      width50Kms: width,
      fluxJyKms: flux,
      fluxErrorJyKms: flux / snr,
      signalToNoise: snr,
      reliability: 0.72,
      story: 'spurious line',
    });
  }
}

function nameApart(detections: Detection[]): void {
  const byName = new Map<string, Detection[]>();
  for (const detection of detections) byName.set(detection.name, [...(byName.get(detection.name) ?? []), detection]);
  for (const same of byName.values()) {
    if (same.length > 1) same.forEach((detection, i) => (detection.name += 'abcdef'[i]!));
  }
}

/** Chance that the optical catalogue holds a source of this magnitude and size: an error function about the extended limit. */
export function isCatalogued(
  mag: number,
  depth: number,
  seeing: number,
  radiusArcsec: number,
  random: Random,
): boolean {
  if (!Number.isFinite(mag)) return false;
  const psfArea = 4 * Math.PI * (seeing / 2.35482) ** 2;
  const area = Math.max(psfArea, Math.PI * radiusArcsec ** 2);
  const limit = depth - 2.5 * Math.log10(Math.sqrt(area / psfArea)) - (area > psfArea ? 1.25 : 0);
  return mag + random.normal(0, 0.3) < limit;
}
