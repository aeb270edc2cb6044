import { fixed, signed } from '#lib/format/number.ts';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

/** Distance from the centre in the unit that reads best: `26″` or `3.6′`. */
export const arc = (arcsec: number): string =>
  arcsec < 100
    ? `${fixed(arcsec, arcsec < 10 ? 1 : 0)}″`
    : arcsec < 6000
      ? `${fixed(arcsec / 60, 1)}′`
      : `${fixed(arcsec / 3600, 2)}°`;

/** Two lines beside a mark: its name; how far it is, in angle, in kpc and in velocity. */
export function markLabel(mark: SkyMark): string {
  const facts = [
    arc(mark.separationArcsec),
    mark.separationKpc !== null && `${fixed(mark.separationKpc, mark.separationKpc < 100 ? 1 : 0)} kpc`,
    mark.velocityDifferenceKms !== null && `${signed(mark.velocityDifferenceKms, 0)} km/s`,
    mark.magnitude !== null && `${mark.band ?? ''} ${fixed(mark.magnitude, 1)}`.trim(),
  ];
  return `${mark.name}\n${facts.filter(Boolean).join('  ')}`;
}
