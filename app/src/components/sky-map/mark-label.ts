import { angleText } from '@eremite/shared/drawing/measure-text';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { fixed, signed } from '#lib/format/number.ts';

/** How far a mark is, in angle, in kpc and in velocity, and how bright. */
export function markFacts(mark: SkyMark): string {
  const facts = [
    angleText(mark.separationArcsec),
    mark.separationKpc !== null && `${fixed(mark.separationKpc, mark.separationKpc < 100 ? 1 : 0)} kpc`,
    mark.velocityDifferenceKms !== null && `${signed(mark.velocityDifferenceKms, 0)} km/s`,
    mark.magnitude !== null && `${mark.band ?? ''} ${fixed(mark.magnitude, 1)}`.trim(),
  ];
  return facts.filter(Boolean).join('  ');
}

/** Two lines beside a mark: its name, and where it is. */
export const markLabel = (mark: SkyMark): string => `${mark.name}\n${markFacts(mark)}`;
