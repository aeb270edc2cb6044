import { COLUMN_ROLES, type ColumnRole } from '@eremite/shared/contracts/intake-settings';
import type { ColumnFacts } from '../tables/table.ts';
import { guessBand } from './magnitude-guess.ts';
import { type NameParts, nameParts } from './name-parts.ts';
import { ROLE_FACTS } from './role-facts.ts';
import type { ColumnSample } from './sample.ts';
import { conversionOf } from './units.ts';

/** What a column seems to hold: a role, or a magnitude of a band and what goes with it. */
export type GuessedRole = ColumnRole | `magnitude:${string}` | `magnitudeError:${string}` | `magnitudeLimit:${string}`;
export interface Guess {
  column: number;
  role: GuessedRole;
  /** 0 to 1; UCD above unit and name above name alone, less where the values speak against it. */
  confidence: number;
}

/** A guess below this is shown to a person but never acted on. */
export const SAFE_GUESS = 0.6;

const ERROR_OF: Partial<Record<ColumnRole, ColumnRole>> = {
  ra: 'positionError',
  dec: 'positionError',
  velocity: 'velocityError',
  redshift: 'redshiftError',
  flux: 'fluxError',
  distance: 'distanceError',
};
/** Parts of a split position are believed only together. */
const SPLIT_ROLES = ['raHours', 'raMinutes', 'raSeconds', 'decDegrees', 'decMinutes', 'decSeconds'] as const;

/**
 * Guesses what each column holds, by UCD, then unit and name, then name, checked against the values of the sample.
 * No role and no column is given twice; the likeliest wins, the first in the table on a tie.
 *
 * @returns at most one guess a column, in column order
 */
export function guessRoles(columns: readonly ColumnFacts[], samples: readonly ColumnSample[]): Guess[] {
  const parts = columns.map(({ name }) => nameParts(name));
  const candidates = columns.flatMap((column, i) => candidatesOf(column, parts[i]!, samples[i]!, i));
  candidates.sort((a, b) => b.confidence - a.confidence || a.column - b.column);
  const takenRoles = new Set<string>();
  const takenColumns = new Set<number>();
  const chosen: Guess[] = [];
  const take = (guess: Guess) => {
    if (takenRoles.has(guess.role) || takenColumns.has(guess.column)) return;
    takenRoles.add(guess.role);
    takenColumns.add(guess.column);
    chosen.push(guess);
  };
  candidates.forEach(take);
  errorsAndLimits(columns, parts, chosen).forEach(take);
  return withoutHalfSplits(chosen).sort((a, b) => a.column - b.column);
}

function candidatesOf(column: ColumnFacts, parts: NameParts, sample: ColumnSample, index: number): Guess[] {
  if (parts.error || parts.limit || /^stat\.(error|min|max)/i.test(column.ucd ?? '')) {
    const role = parts.error ? null : byUcd('positionError', column);
    return role === null || role === 0 ? [] : [{ column: index, role: 'positionError', confidence: role }];
  }
  const guesses: Guess[] = [];
  const described = COLUMN_ROLES.some((role) => byUcd(role, column) >= 0.9);
  for (const role of COLUMN_ROLES) {
    const said = byUcd(role, column);
    // What a UCD says of another role is evidence against a name.
    const confidence = Math.max(said, byName(role, parts) * (said === 0 && described ? 0.5 : 1));
    const sure = confidence * plausibility(role, column, parts, sample);
    if (sure >= 0.3) guesses.push({ column: index, role, confidence: round(sure) });
  }
  const band = guessBand(column, sample);
  if (band) guesses.push({ column: index, role: `magnitude:${band.band}`, confidence: round(band.confidence) });
  return guesses;
}

const round = (value: number): number => Math.round(value * 100) / 100;
const best = (text: string, list: readonly (readonly [RegExp, number])[]): number =>
  list.find(([pattern]) => pattern.test(text))?.[1] ?? 0;

function byUcd(role: ColumnRole, { ucd = '', name }: ColumnFacts): number {
  const confidence = best(ucd.trim().toLowerCase(), ROLE_FACTS[role].ucds);
  return role === 'width50' && /20/.test(name) ? 0 : confidence;
}

function byName(role: ColumnRole, { base, unit }: NameParts): number {
  const { names, quantity } = ROLE_FACTS[role];
  const confidence = best(base, names);
  if (confidence === 0 || unit === undefined) return confidence;
  return conversionOf(quantity, unit) ? Math.min(0.96, confidence + 0.05) : 0.2;
}

/** 1 where values and unit fit the role, less where they do not, 0 where they cannot be. */
function plausibility(role: ColumnRole, column: ColumnFacts, parts: NameParts, sample: ColumnSample): number {
  const { quantity, range } = ROLE_FACTS[role];
  if (role === 'name') return column.type === 'number' ? 0.5 : 1;
  if (role === 'decSign') return sample.texts > 0 || sample.rows === 0 ? 1 : 0;
  const unit = column.unit ?? parts.unit;
  const conversion = unit === undefined || unit === '' ? undefined : conversionOf(quantity, unit);
  if (unit && quantity !== 'number' && !conversion) return 0.3;
  // Without a unit a distance may be kpc, Mpc or a modulus, a radius arcsec, arcmin or pixels: nothing in the numbers
  // tells, so neither is taken unasked.
  if ((role === 'distance' || role === 'effectiveRadius') && !conversion) return 0.6;
  if (column.type === 'text' && sample.texts > sample.numbers) {
    return (role === 'ra' || role === 'dec') && sample.sexagesimal > 0.5 ? 1 : 0.2;
  }
  if (sample.numbers === 0) return sample.rows === 0 ? 0.9 : 0.8;
  if (conversion?.rule) return 1;
  const middle = sample.median * (conversion?.factor ?? 1);
  const low = role === 'velocity' ? -500 : range[0];
  // Beyond a redshift of 8 the column is a z magnitude.
  const high = role === 'redshift' ? 8 : range[1];
  return middle >= low && middle <= high ? 1 : 0.3;
}

/** "e_cz", "rmag_err", "l_rmag" belong to the column they are named after. */
function errorsAndLimits(
  columns: readonly ColumnFacts[],
  parts: readonly NameParts[],
  chosen: readonly Guess[],
): Guess[] {
  const found: Guess[] = [];
  columns.forEach((_, column) => {
    const { base, error, limit } = parts[column]!;
    if (!error && !limit) return;
    const owner = chosen.find((guess) => parts[guess.column]!.base === base) ?? roleNamed(base, chosen);
    if (!owner) return;
    if (owner.role.startsWith('magnitude:')) {
      const band = owner.role.slice('magnitude:'.length);
      found.push({ column, role: error ? `magnitudeError:${band}` : `magnitudeLimit:${band}`, confidence: 0.8 });
    } else if (error) {
      const role = ERROR_OF[owner.role as ColumnRole];
      if (role) found.push({ column, role, confidence: role === 'positionError' ? 0.6 : 0.8 });
    }
  });
  return found;
}

/** The chosen column whose role has the name an error column is named after: "e_hiflux" beside "flux_hi". */
function roleNamed(base: string, chosen: readonly Guess[]): Guess | undefined {
  return chosen.find(({ role }) => role in ROLE_FACTS && best(base, ROLE_FACTS[role as ColumnRole].names) > 0);
}

function withoutHalfSplits(chosen: readonly Guess[]): Guess[] {
  const roles = new Set(chosen.map(({ role }) => role));
  const whole = SPLIT_ROLES.filter((role) => !role.endsWith('Seconds')).every((role) => roles.has(role));
  const split = (role: string) => role === 'decSign' || (SPLIT_ROLES as readonly string[]).includes(role);
  if (roles.has('ra') && roles.has('dec')) return chosen.filter(({ role }) => !split(role));
  return whole ? [...chosen] : chosen.filter(({ role }) => !split(role));
}
