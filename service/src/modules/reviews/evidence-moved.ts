import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { separationArcsec } from '../../matching/separation-arcsec.ts';

/**
 * By how much a number may differ while a person's word on it still stands. The verdicts' own words are compared as they
 * are. Values are choices, not measurements: below them a reviewer would see the same page.
 */
const STANDS = {
  /** P(none), P(missed), P(no neighbour). */
  probability: 0.02,
  power: 0.01,
  /** Relative: distance, flux, projected separation of the nearest neighbour. */
  relative: 0.01,
  positionArcsec: 1,
  objectArcsec: 0.3,
  velocityKms: 1,
} as const;
/** An object less likely than this in both is no part of the evidence: which of the unlikely ones leads is chance. */
const LEAST_LIKELY = 0.1;

type Compared = Pick<
  VerdictItem,
  | 'starlight'
  | 'surroundings'
  | 'pNone'
  | 'pMissed'
  | 'pAlone'
  | 'power'
  | 'distanceMpc'
  | 'fluxJyKms'
  | 'velocityKms'
  | 'raDeg'
  | 'decDeg'
  | 'counterpart'
  | 'nearest'
  | 'doubts'
>;

const text = (value: number | null, decimals: number): string => (value === null ? 'none' : value.toFixed(decimals));

function number(
  what: string,
  unit: string,
  decimals: number,
  from: number | null,
  to: number | null,
  tolerance: number,
): Moved[] {
  if (from === null && to === null) return [];
  const by = from === null || to === null ? null : to - from;
  if (by !== null && Math.abs(by) <= tolerance) return [];
  return [{ what, from: text(from, decimals), to: text(to, decimals), by, unit }];
}

const word = (what: string, from: string, to: string): Moved[] =>
  from === to ? [] : [{ what, from, to, by: null, unit: '' }];

const likely = ({ counterpart }: Compared): boolean => (counterpart?.probability ?? 0) >= LEAST_LIKELY;
const doubtsOf = ({ doubts }: Compared): string =>
  doubts
    .map(({ name, grade }) => `${name} (${grade})`)
    .sort()
    .join(', ') || 'none';

/** A source that was only renamed, or a twin at the very same separation, is no other evidence. */
const sameObject = ({ counterpart: a }: Compared, { counterpart: b }: Compared): boolean =>
  a !== null && b !== null && Math.abs(a.separationArcsec - b.separationArcsec) <= STANDS.objectArcsec;
const sameNeighbour = (a: Compared['nearest'], b: Compared['nearest']): boolean =>
  a !== null &&
  b !== null &&
  Math.abs(a.separationKpc - b.separationKpc) <= a.separationKpc * STANDS.relative &&
  Math.abs(a.velocityDifferenceKms - b.velocityDifferenceKms) <= STANDS.velocityKms;

/** What moved between the evidence a word was given on and that of a later run; empty where the word stands. */
export function evidenceMoved(from: Compared, to: Compared): Moved[] {
  const relative = (value: number | null) => Math.abs(value ?? 0) * STANDS.relative;
  const shift = separationArcsec(from.raDeg, from.decDeg, to.raDeg, to.decDeg);
  const both = likely(from) || likely(to);
  const [before, after] = [from.nearest, to.nearest];
  return [
    ...word('starlight', from.starlight, to.starlight),
    ...word('surroundings', from.surroundings, to.surroundings),
    ...number('position', 'arcsec', 1, 0, shift, STANDS.positionArcsec),
    ...number('velocity', 'km/s', 0, from.velocityKms, to.velocityKms, STANDS.velocityKms),
    ...number('HI flux', 'Jy km/s', 2, from.fluxJyKms, to.fluxJyKms, relative(from.fluxJyKms)),
    ...number('distance', 'Mpc', 1, from.distanceMpc, to.distanceMpc, relative(from.distanceMpc)),
    ...number('P(none)', '', 2, from.pNone, to.pNone, STANDS.probability),
    ...number('P(missed)', '', 2, from.pMissed, to.pMissed, STANDS.probability),
    ...number('power', '', 3, from.power, to.power, STANDS.power),
    ...(both && !sameObject(from, to)
      ? word('best object', from.counterpart?.name ?? 'none', to.counterpart?.name ?? 'none')
      : []),
    ...number('P(no neighbour)', '', 2, from.pAlone, to.pAlone, STANDS.probability),
    ...(sameNeighbour(before, after) ? [] : word('nearest neighbour', before?.name ?? 'none', after?.name ?? 'none')),
    ...(before && after && before.name === after.name
      ? number(
          'separation of the nearest neighbour',
          'kpc',
          0,
          before.separationKpc,
          after.separationKpc,
          relative(before.separationKpc),
        )
      : []),
    ...word('doubts', doubtsOf(from), doubtsOf(to)),
  ];
}
