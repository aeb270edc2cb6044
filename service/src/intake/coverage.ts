import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { Moc } from '@eremite/shared/science/sky/moc';
import type { RoleTable } from '../tiles/role-table.ts';
import type { ResolvedSettings } from './resolved.ts';
import { SettingsError } from './resolved.ts';

/** Where a catalogue has looked. Without a region nothing can be concluded from a place where it has no row. */
export interface Coverage {
  type: ResolvedSettings['footprint']['type'];
  moc: Moc | null;
  areaSqDeg: number | null;
  /** How the region was found, or why there is none. */
  note: string;
}

/** Region of a catalogue as its settings give it, or as its rows show it. @throws {SettingsError} for a faulty region */
export function coverageOf({ footprint }: ResolvedSettings, _roles: RoleTable): Coverage {
  try {
    switch (footprint.type) {
      case 'all-sky':
        return known('all-sky', Moc.allSky(), 'the whole sky, as stated.');
      case 'moc':
        return known('moc', mocOf(footprint.value), 'the uploaded region.');
      case 'circles':
        return known('circles', circles(footprint.value), 'the circles given.');
      default:
        return {
          type: 'unknown',
          moc: null,
          areaSqDeg: null,
          note: 'it is unknown, so a place without rows shows nothing.',
        };
    }
  } catch (error) {
    if (error instanceof DomainError) throw new SettingsError([{ pointer: '/footprint/value', detail: error.message }]);
    throw error;
  }
}

function known(type: Coverage['type'], moc: Moc, note: string): Coverage {
  return { type, moc, areaSqDeg: moc.area / DEGREE ** 2, note };
}

function mocOf(value: unknown): Moc {
  if (typeof value === 'string') return Moc.parse(value);
  if (typeof value === 'object' && value !== null) return Moc.parseJson(JSON.stringify(value));
  throw new DomainError('A MOC is given as text, such as "6/24185 24190", or as JSON by order.');
}

function circles(value: unknown): Moc {
  if (!Array.isArray(value) || value.length === 0)
    throw new DomainError('Circles are given as [[raDeg, decDeg, radiusDeg], …].');
  return value
    .map((circle: unknown) => {
      const [ra, dec, radius] = Array.isArray(circle) ? (circle as unknown[]) : [];
      if (
        typeof ra !== 'number' ||
        typeof dec !== 'number' ||
        typeof radius !== 'number' ||
        !(radius > 0 && radius <= 180)
      ) {
        throw new DomainError(`A circle is [raDeg, decDeg, radiusDeg], found ${JSON.stringify(circle)}.`);
      }
      const order = Math.min(14, Math.max(6, Math.ceil(Math.log2(58.6 / radius)) + 5));
      return Moc.fromCone(order, ra * DEGREE, dec * DEGREE, radius * DEGREE);
    })
    .reduce((all, one) => all.union(one));
}
