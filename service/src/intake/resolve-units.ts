import { COLUMN_ROLES, type ColumnRole, type IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { ColumnFacts } from '../tables/table.ts';
import { nameParts } from './name-parts.ts';
import type { Remarks } from './resolve-columns.ts';
import type { ResolvedSettings } from './resolved.ts';
import { ROLE_FACTS } from './role-facts.ts';
import type { ColumnSample } from './sample.ts';
import { CANONICAL_UNIT, conversionOf, type Quantity } from './units.ts';

/** A typical velocity beyond this without a unit is more likely one in m/s than one of a galaxy at z > 1. */
const FASTEST_KMS = 300_000;
/** Beyond this the 21-cm line has hardly been seen: such a column without a unit is more likely one in kpc. */
const FARTHEST_MPC = 2000;
const UNITLESS: readonly Quantity[] = ['number'];

/**
 * Settles the unit of every column with a role: the settings', else the file's, else the one in the column's name, else
 * the canonical unit, which is then said to be assumed. A unit that cannot be one of the role is a fault where a
 * person gave it and a question where the file did.
 *
 * @returns unit by role, and by `magnitude:<band>`
 */
export function resolveUnits(
  settings: IntakeSettings,
  columns: ResolvedSettings['columns'],
  table: ReadonlyMap<string, { facts: ColumnFacts; sample: ColumnSample }>,
  remarks: Remarks,
): Record<string, string> {
  const units: Record<string, string> = {};
  const given = settings.units ?? {};
  const settle = (key: string, column: string, quantity: Quantity, says: string) => {
    const { facts, sample } = table.get(column)!;
    const pointer = `/units/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`;
    const wanted = given[key];
    if (wanted !== undefined && wanted.trim() !== '') {
      units[key] = wanted;
      if (!conversionOf(quantity, wanted)) {
        const example = CANONICAL_UNIT[quantity];
        remarks.faults.push({
          pointer,
          detail: `"${wanted}" is not a unit of ${says}; write for example "${example}".`,
        });
      }
      return;
    }
    const stated = facts.unit?.trim() || nameParts(column).unit;
    if (stated) {
      units[key] = stated;
      if (conversionOf(quantity, stated)) return;
      units[key] = CANONICAL_UNIT[quantity];
      remarks.questions.push({
        level: 'assumed',
        pointer,
        text: `The unit "${stated}" of "${column}" is not one of ${says}: ${CANONICAL_UNIT[quantity]} is assumed.`,
      });
      return;
    }
    units[key] = CANONICAL_UNIT[quantity];
    if (UNITLESS.includes(quantity) || quantity === 'magnitude') return;
    // Sexagesimal text and plain degrees need no unit; whether decimals may be hours is asked when all are seen.
    if (quantity === 'angle') return;
    const inMetres = quantity === 'velocity' && sample.numbers > 0 && Math.abs(sample.median) > FASTEST_KMS;
    const inKpc = quantity === 'distance' && sample.numbers > 0 && sample.median > FARTHEST_MPC;
    const doubt = inMetres
      ? ' Its values are above the speed of light in km/s: are they m/s?'
      : inKpc
        ? ` Half its values are above ${FARTHEST_MPC}: are they kpc?`
        : '';
    remarks.questions.push({
      level: inMetres || inKpc ? 'ask' : 'assumed',
      pointer,
      text: `The unit of "${column}" (${says}) is not stated: ${CANONICAL_UNIT[quantity]} is assumed.${doubt}`,
    });
  };
  for (const role of COLUMN_ROLES) {
    const column = columns[role];
    if (column === null || !table.has(column)) continue;
    settle(role, column, quantityOf(role), ROLE_FACTS[role].says);
  }
  for (const { column, band } of columns.magnitudes)
    settle(`magnitude:${band}`, column, 'magnitude', `magnitude ${band}`);
  for (const key of Object.keys(given)) {
    if (key in units || (COLUMN_ROLES as readonly string[]).includes(key) || key.startsWith('magnitude:')) continue;
    remarks.faults.push({
      pointer: `/units/${key}`,
      detail: `There is no role "${key}"; units are given by role, as in {"velocity": "km/s"}.`,
    });
  }
  return units;
}

/** Quantity of a role's column. */
export function quantityOf(role: ColumnRole): Quantity {
  return ROLE_FACTS[role].quantity;
}
