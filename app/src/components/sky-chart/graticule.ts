import { lineStep, type SkyProjection } from './project-sky.ts';

export interface SkyLine {
  points: [x: number, y: number][];
  label: string;
}

/** Meridians and parallels within a range of directions, as lines of the projection's plane. */
export function graticule(projection: SkyProjection, spanDeg: number): SkyLine[] {
  const { centre, kind, place } = projection;
  const whole = kind === 'whole sky';
  const step = whole ? 30 : lineStep(spanDeg);
  const reach = whole ? 90 : spanDeg * 1.2;
  const lowest = Math.max(-90, Math.floor((centre.decDeg - reach) / step) * step);
  const highest = Math.min(90, Math.ceil((centre.decDeg + reach) / step) * step);
  const raReach = whole ? 180 : Math.min(180, reach / Math.max(0.1, Math.cos((centre.decDeg * Math.PI) / 180)));
  const raStep = whole ? 60 : lineStep(2 * raReach);
  const firstRa = Math.floor((centre.raDeg - raReach) / raStep) * raStep;
  const lastRa = Math.ceil((centre.raDeg + raReach) / raStep) * raStep;
  const trace = (count: number, at: (i: number) => [number, number]) =>
    Array.from({ length: count + 1 }, (_, i) => place(...at(i / count))).filter(
      (p): p is [number, number] => p !== undefined,
    );
  const lines: SkyLine[] = [];
  for (let dec = lowest; dec <= highest; dec += step) {
    // A hair inside the seam, where the whole-sky map is cut.
    const points = trace(60, (t) => [firstRa + 1e-6 + t * (lastRa - firstRa - 2e-6), dec]);
    lines.push({ points, label: `${dec > 0 ? '+' : dec < 0 ? '−' : ''}${Math.abs(dec)}°` });
  }
  for (let ra = firstRa; ra <= lastRa; ra += raStep) {
    const hours = (((ra % 360) + 360) % 360) / 15;
    const inside = whole && ra === firstRa ? ra + 1e-6 : whole && ra === lastRa ? ra - 1e-6 : ra;
    const points = trace(40, (t) => [inside, lowest + t * (highest - lowest)]);
    const minutes = Math.round((hours % 1) * 60);
    lines.push({ points, label: `${Math.floor(hours)}ʰ${minutes ? `${String(minutes).padStart(2, '0')}ᵐ` : ''}` });
  }
  return lines;
}
