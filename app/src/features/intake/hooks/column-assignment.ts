import type { IntakeColumn } from '@eremite/shared/contracts/intake';
import { COLUMN_ROLES, type IntakeSettings } from '@eremite/shared/contracts/intake-settings';

/** What each column is taken for: a role, or `magnitude:r` and its companions `magnitudeError:r`, `magnitudeLimit:r`. */
export type Assignment = Record<string, string | null>;

const SINGLE = COLUMN_ROLES.filter((role) => role !== 'magnitude');

/** Reads the roles out of the settings; where the settings are silent the guess stands. */
export function readAssignment(columns: readonly IntakeColumn[], settings: IntakeSettings): Assignment {
  const chosen = settings.columns ?? {};
  const assignment: Assignment = {};
  const taken = new Set<string>();
  const give = (column: string | null | undefined, role: string) => {
    if (!column) return;
    assignment[column] = role;
    taken.add(role);
  };
  for (const role of SINGLE) {
    if (chosen[role] === null) taken.add(role);
    give(chosen[role], role);
  }
  const band = typeof settings.band === 'string' ? settings.band : settings.band?.name;
  if (chosen.magnitude) give(chosen.magnitude, `magnitude:${band ?? '?'}`);
  for (const { column, band: of, error, limitFlag } of chosen.magnitudes ?? []) {
    give(column, `magnitude:${of}`);
    give(error, `magnitudeError:${of}`);
    give(limitFlag, `magnitudeLimit:${of}`);
  }
  const saysMagnitudes = chosen.magnitudes !== undefined || chosen.magnitude !== undefined;
  for (const { name, guess } of columns) {
    if (name in assignment) continue;
    const open = guess !== null && !taken.has(guess) && !(saysMagnitudes && guess.startsWith('magnitude'));
    assignment[name] = open ? guess : null;
    if (open) taken.add(guess);
  }
  return assignment;
}

/** Writes the roles back in full, so that nothing is guessed again behind the reader's back. */
export function writeAssignment(assignment: Assignment): NonNullable<IntakeSettings['columns']> {
  const columnOf = (role: string) => Object.keys(assignment).find((column) => assignment[column] === role) ?? null;
  const bands = Object.values(assignment).flatMap((role) => (role?.startsWith('magnitude:') ? [role.slice(10)] : []));
  return {
    ...Object.fromEntries(SINGLE.map((role) => [role, columnOf(role)])),
    magnitude: null,
    magnitudes: [...new Set(bands)].map((band) => ({
      column: columnOf(`magnitude:${band}`)!,
      error: columnOf(`magnitudeError:${band}`),
      limitFlag: columnOf(`magnitudeLimit:${band}`),
      band,
    })),
  } as NonNullable<IntakeSettings['columns']>;
}

/** Gives a column a role, taking it from the column that had it: one role, one column. */
export function assign(assignment: Assignment, column: string, role: string | null): Assignment {
  const next = { ...assignment };
  for (const other of Object.keys(next)) if (role !== null && next[other] === role) next[other] = null;
  next[column] = role;
  return next;
}

/** Text, flags and pure numbers; the parts of a sexagesimal position have their units in their names. */
const WITHOUT_UNIT =
  /^(name|redshift|redshiftError|redshiftQuality|signalToNoise|reliability|axisRatio|starGalaxy|memberCount|ra(Hours|Minutes|Seconds)|dec(Sign|Degrees|Minutes|Seconds)|magnitude(Error|Limit):.*)$/;

/** Whether a unit may be given for a role; errors and limits of a magnitude share that of the magnitude. */
export const takesUnit = (role: string): boolean => !WITHOUT_UNIT.test(role);

/** Units with one put in, or taken out where it is undefined. */
export function withUnit(
  units: IntakeSettings['units'],
  role: string,
  unit: string | undefined,
): IntakeSettings['units'] {
  const next = Object.fromEntries(Object.entries(units ?? {}).filter(([key]) => key !== role));
  if (unit !== undefined) next[role] = unit;
  return Object.keys(next).length > 0 ? next : undefined;
}
