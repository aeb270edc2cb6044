import { COLUMN_ROLES, type ColumnRole, type IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { CatalogueKind } from '@eremite/shared/contracts/words';
import { bandOf } from '@eremite/shared/science/photometry/band-of';
import { type Guess, SAFE_GUESS } from './guess-roles.ts';
import { nearNames } from './name-parts.ts';
import type { ResolvedMagnitude, ResolvedSettings, SettingsFault } from './resolved.ts';
import { ROLE_FACTS } from './role-facts.ts';

export interface Remarks {
  questions: SettingsQuestion[];
  faults: SettingsFault[];
}
type Columns = ResolvedSettings['columns'];

/** Roles that say the same thing: once a person names one, the others are not guessed. */
const ALTERNATIVES: readonly (readonly ColumnRole[])[] = [
  ['velocity', 'redshift', 'frequency'],
  ['properMotion', 'properMotionRa', 'properMotionDec'],
];
export const SPLIT_ROLES: readonly ColumnRole[] = [
  'raHours',
  'raMinutes',
  'raSeconds',
  'decSign',
  'decDegrees',
  'decMinutes',
  'decSeconds',
];
/** Roles that mean something only in some kinds of catalogue; elsewhere they are not guessed. */
const ONLY_IN: Partial<Record<ColumnRole, readonly CatalogueKind[]>> = {
  width50: ['hi'],
  width20: ['hi'],
  flux: ['hi'],
  fluxError: ['hi'],
  frequency: ['hi'],
  reliability: ['hi'],
  beamMajor: ['hi'],
  beamMinor: ['hi'],
  continuumFlux: ['hi', 'continuum'],
  memberCount: ['groups'],
  velocityDispersion: ['groups'],
  groupRadius: ['groups'],
  groupMass: ['groups'],
};

/** Roles that are not taken without a stated unit, and whose absence a person should know of. */
const UNASKED_FOR: readonly ColumnRole[] = ['distance', 'effectiveRadius'];

/** Finds the column a setting names; tells what is near when there is none. */
export function findColumn(
  names: readonly string[],
  wanted: string,
  pointer: string,
  { faults }: Remarks,
): string | null {
  if (names.includes(wanted)) return wanted;
  const trimmed = names.filter((name) => name.trim().toLowerCase() === wanted.trim().toLowerCase());
  if (trimmed.length === 1) return trimmed[0]!;
  const near = nearNames(wanted, names);
  const hint = near.length
    ? `Did you mean ${near.map((name) => `"${name}"`).join(' or ')}?`
    : `Its columns are ${names.slice(0, 12).join(', ')}${names.length > 12 ? ', …' : ''}.`;
  faults.push({ pointer, detail: `The table has no column "${wanted}". ${hint}` });
  return null;
}

/**
 * Settles which column has which role: those the settings name, then safe guesses for roles they leave open. Every
 * guess taken becomes an `assumed` sentence; every name that does not fit, or is given twice, a fault.
 */
export function resolveColumns(
  settings: IntakeSettings,
  names: readonly string[],
  guesses: readonly Guess[],
  kind: CatalogueKind,
  remarks: Remarks,
): Columns {
  const given = settings.columns ?? {};
  const columns = Object.fromEntries(COLUMN_ROLES.map((role) => [role, null])) as unknown as Columns;
  const usedBy = new Map<string, string>();
  const use = (column: string, says: string, pointer: string) => {
    const other = usedBy.get(column);
    // One column may well be error and limit flag of several bands; position, velocity and the like may not share.
    if (other)
      remarks.faults.push({ pointer, detail: `Column "${column}" is named twice: as ${other} and as ${says}.` });
    else usedBy.set(column, says);
  };
  for (const role of COLUMN_ROLES) {
    const wanted = given[role];
    if (wanted == null) continue;
    columns[role] = findColumn(names, wanted, `/columns/${role}`, remarks);
    if (columns[role] !== null && role !== 'name') use(columns[role], ROLE_FACTS[role].says, `/columns/${role}`);
  }
  columns.magnitudes = namedMagnitudes(settings, columns, names, guesses, kind, remarks, use);
  addGuesses(settings, columns, names, guesses, kind, remarks, usedBy);
  // The single magnitude has become one of the list.
  columns.magnitude = null;
  return columns;
}

function namedMagnitudes(
  settings: IntakeSettings,
  columns: Columns,
  names: readonly string[],
  guesses: readonly Guess[],
  kind: CatalogueKind,
  remarks: Remarks,
  use: (column: string, says: string, pointer: string) => void,
): ResolvedMagnitude[] {
  const list: ResolvedMagnitude[] = [];
  const optional = (name: string | null | undefined, pointer: string) =>
    name == null ? null : findColumn(names, name, pointer, remarks);
  const add = (magnitude: ResolvedMagnitude, pointer: string) => {
    const same = list.find(({ band }) => band === magnitude.band);
    if (!same) list.push(magnitude);
    else
      remarks.faults.push({
        pointer,
        detail: `Band ${magnitude.band} is given twice: by "${same.column}" and "${magnitude.column}".`,
      });
  };
  (settings.columns?.magnitudes ?? []).forEach(({ column, error, limitFlag, band }, i) => {
    const pointer = `/columns/magnitudes/${i}`;
    const found = findColumn(names, column, `${pointer}/column`, remarks);
    const errorColumn = optional(error, `${pointer}/error`);
    const limitColumn = optional(limitFlag, `${pointer}/limitFlag`);
    if (found === null) return;
    use(found, `magnitude ${band}`, `${pointer}/column`);
    add({ column: found, error: errorColumn, limitFlag: limitColumn, band: bandOf(band) ?? band.trim() }, pointer);
  });
  if (columns.magnitude !== null) {
    const column = columns.magnitude;
    const said = typeof settings.band === 'string' ? settings.band : settings.band?.name;
    const guessed = guesses.find((guess) => names[guess.column] === column && guess.role.startsWith('magnitude:'));
    let band = said ?? guessed?.role.slice('magnitude:'.length) ?? bandOf(column);
    if (band === undefined) {
      band = kind === 'infrared' ? 'Ks' : kind === 'ultraviolet' ? 'NUV' : 'r';
      remarks.questions.push({
        level: 'assumed',
        pointer: '/band',
        text: `The band of "${column}" is not stated: ${band} is assumed.`,
      });
    }
    add({ column, error: null, limitFlag: null, band: bandOf(band) ?? band.trim() }, '/columns/magnitude');
  }
  return list;
}

function addGuesses(
  settings: IntakeSettings,
  columns: Columns,
  names: readonly string[],
  guesses: readonly Guess[],
  kind: CatalogueKind,
  remarks: Remarks,
  usedBy: Map<string, string>,
): void {
  const given = settings.columns ?? {};
  const magnitudesOpen = given.magnitudes === undefined && given.magnitude === undefined;
  const splitNamed = SPLIT_ROLES.some((role) => given[role] != null);
  const open = (role: ColumnRole): boolean => {
    if (given[role] !== undefined || columns[role] !== null) return false;
    const only = ONLY_IN[role];
    if (only && !only.includes(kind)) return false;
    if ((role === 'ra' || role === 'dec') && splitNamed) return false;
    if (SPLIT_ROLES.includes(role)) return given.ra == null && given.dec == null;
    return !ALTERNATIVES.some((group) => group.includes(role) && group.some((other) => given[other] != null));
  };
  const taken: string[] = [];
  const take = (column: string, says: string) => {
    usedBy.set(column, says);
    taken.push(`"${column}" as ${says}`);
  };
  for (const guess of guesses) {
    const column = names[guess.column]!;
    if (guess.confidence < SAFE_GUESS || usedBy.has(column)) continue;
    const [role, band] = guess.role.split(/:(.*)/s) as [string, string?];
    if (band === undefined) {
      if (role === 'magnitude' || !open(role as ColumnRole)) continue;
      columns[role as ColumnRole] = column;
      take(column, ROLE_FACTS[role as ColumnRole].says);
    } else if (role === 'magnitude' && magnitudesOpen && kind !== 'hi') {
      columns.magnitudes.push({ column, error: null, limitFlag: null, band });
      take(column, `magnitude ${band}`);
    }
  }
  for (const guess of guesses) {
    const [role, band] = guess.role.split(/:(.*)/s) as [string, string?];
    const magnitude = columns.magnitudes.find((m) => m.band === band);
    const named = given.magnitudes?.find((m) => m.column === magnitude?.column);
    const column = names[guess.column]!;
    if (!magnitude || usedBy.has(column)) continue;
    if (role === 'magnitudeError' && magnitude.error === null && named?.error === undefined) {
      magnitude.error = column;
      take(column, `error of magnitude ${band}`);
    } else if (role === 'magnitudeLimit' && magnitude.limitFlag === null && named?.limitFlag === undefined) {
      magnitude.limitFlag = column;
      take(column, `limit flag of magnitude ${band}`);
    }
  }
  keepOneVelocity(columns, given, kind, taken);
  for (const { role, column, confidence } of guesses) {
    if (confidence >= SAFE_GUESS || !UNASKED_FOR.includes(role as ColumnRole) || !open(role as ColumnRole)) continue;
    const says = ROLE_FACTS[role as ColumnRole].says;
    const text = `"${names[column]}" may hold the ${says}, but its unit is not stated and it is not used: name the column and its unit to have it used.`;
    remarks.questions.push({ level: 'warning', pointer: `/columns/${role}`, text });
  }
  if (taken.length) {
    remarks.questions.push({
      level: 'assumed',
      pointer: '/columns',
      text: `Columns taken by their names, units or UCDs: ${taken.join('; ')}.`,
    });
  }
}

/** Of velocity, redshift and frequency all guessed, one is kept: a line list's velocity, a galaxy list's redshift. */
function keepOneVelocity(
  columns: Columns,
  given: NonNullable<IntakeSettings['columns']>,
  kind: CatalogueKind,
  taken: string[],
): void {
  const order: ColumnRole[] =
    kind === 'hi' ? ['velocity', 'redshift', 'frequency'] : ['redshift', 'velocity', 'frequency'];
  const first = order.find((role) => columns[role] !== null);
  for (const role of order) {
    if (role === first || columns[role] === null || given[role] != null) continue;
    const at = taken.findIndex((text) => text.startsWith(`"${columns[role]}" as `));
    if (at >= 0) taken.splice(at, 1);
    columns[role] = null;
  }
  if (columns.velocity === null && given.velocityError == null) columns.velocityError = null;
  if (columns.redshift === null && given.redshiftError == null) columns.redshiftError = null;
}
