import type { ColumnRole } from '@eremite/shared/contracts/intake-settings';
import type { SkyFrame } from '@eremite/shared/science/sky/frames';
import type { ColumnFacts } from '../tables/table.ts';
import { MissingMarks, type NumberRecipe } from './number-cells.ts';
import type { AxisRecipe, PositionRecipe } from './positions.ts';
import type { ResolvedSettings } from './resolved.ts';
import { ROLE_FACTS } from './role-facts.ts';
import { conversionOf } from './units.ts';

/** Column of a role table for each role that is simply a number; the rest are made from several. */
const ROLE_COLUMN: Partial<Record<ColumnRole, string>> = {
  positionError: 'positionErrorArcsec',
  velocityError: 'velocityErrorKms',
  width50: 'width50Kms',
  width20: 'width20Kms',
  flux: 'fluxJyKms',
  fluxError: 'fluxErrorJyKms',
  signalToNoise: 'signalToNoise',
  reliability: 'reliability',
  distance: 'distanceMpc',
  effectiveRadius: 'effectiveRadiusArcsec',
  axisRatio: 'axisRatio',
  positionAngle: 'positionAngleDeg',
  starGalaxy: 'starProbability',
  redshiftQuality: 'redshiftQuality',
  reddening: 'ebvMag',
  properMotion: 'pmMasYr',
  properMotionRa: 'pmRaMasYr',
  properMotionDec: 'pmDecMasYr',
  continuumFlux: 'continuumMjy',
  beamMajor: 'beamMajorArcsec',
  beamMinor: 'beamMinorArcsec',
  memberCount: 'memberCount',
  velocityDispersion: 'velocityDispersionKms',
  groupRadius: 'groupRadiusMpc',
  groupMass: 'groupMassSun',
};

/** Everything a chunk needs to become a role table, with column names looked up once. */
export interface Recipe {
  position: PositionRecipe;
  /** Index of the name column, if any. */
  name: number | null;
  numbers: { target: string; recipe: NumberRecipe }[];
  velocity: NumberRecipe | null;
  redshift: NumberRecipe | null;
  frequency: NumberRecipe | null;
  redshiftError: NumberRecipe | null;
  /** With a distance modulus the error is one of the modulus, mag. */
  distanceError: { recipe: NumberRecipe; ofModulus: boolean } | null;
  magnitudes: { band: string; value: NumberRecipe; error: NumberRecipe | null; limitFlag: number | null }[];
  /** Values by their text and, where they are numbers, by the number too; each leads to the value as it was written. */
  keep: { index: number; column: string; values: Map<string | number, string> }[];
  marks: MissingMarks;
}

const STAR_WORDS = {
  star: 1,
  s: 1,
  psf: 1,
  stellar: 1,
  galaxy: 0,
  g: 0,
  gal: 0,
  extended: 0,
  exp: 0,
  dev: 0,
  ser: 0,
  rex: 0,
};

/** Looks the columns of resolved settings up in the table. @throws {Error} if one is not there: resolve first */
export function recipeOf(resolved: ResolvedSettings, columns: readonly ColumnFacts[]): Recipe {
  const indexOf = (name: string): number => {
    const index = columns.findIndex((column) => column.name === name);
    if (index < 0) throw new Error(`resolved settings name a column "${name}" that the table does not have`);
    return index;
  };
  const number = (role: ColumnRole): NumberRecipe | null => {
    const column = resolved.columns[role];
    if (column === null) return null;
    const { quantity, range, says } = ROLE_FACTS[role];
    const conversion = conversionOf(quantity, resolved.units[role] ?? '') ?? { factor: 1 };
    const words = role === 'starGalaxy' ? { words: STAR_WORDS } : {};
    // The range of fluxes is one in Jy km/s; in Jy Hz it cannot be applied before the velocity is known.
    const reach = conversion.rule === 'fluxFromFrequency' ? ([Number.MIN_VALUE, Infinity] as const) : range;
    return { index: indexOf(column), column, says, conversion, range: reach, ...words };
  };
  return {
    position: positionOf(resolved, indexOf),
    name: resolved.columns.name === null ? null : indexOf(resolved.columns.name),
    numbers: Object.entries(ROLE_COLUMN).flatMap(([role, target]) => {
      const recipe = number(role as ColumnRole);
      return recipe ? [{ target, recipe }] : [];
    }),
    velocity: number('velocity'),
    redshift: number('redshift'),
    frequency: number('frequency'),
    redshiftError: number('redshiftError'),
    distanceError: distanceErrorOf(number('distance'), number('distanceError')),
    magnitudes: resolved.columns.magnitudes.map(({ column, error, limitFlag, band }) => {
      const conversion = conversionOf('magnitude', resolved.units[`magnitude:${band}`] ?? 'mag') ?? { factor: 1 };
      const value = {
        index: indexOf(column),
        column,
        says: 'magnitude',
        conversion,
        range: ROLE_FACTS.magnitude.range,
      };
      // Errors of fluxes would need the flux; they are kept among the original cells only.
      const errorKnown = error !== null && conversion.rule === undefined;
      return {
        band,
        value,
        error: errorKnown
          ? {
              ...value,
              index: indexOf(error),
              column: error,
              says: 'magnitude error',
              range: [Number.MIN_VALUE, 20] as const,
            }
          : null,
        limitFlag: limitFlag === null ? null : indexOf(limitFlag),
      };
    }),
    keep: resolved.keep.map(({ column, values }) => ({
      index: indexOf(column),
      column,
      values: new Map(
        values.flatMap((value): [string | number, string][] => {
          const text = value.trim();
          const number = text === '' ? NaN : Number(text);
          return Number.isFinite(number)
            ? [
                [text, text],
                [number, text],
              ]
            : [[text, text]];
        }),
      ),
    })),
    marks: new MissingMarks(resolved.missing),
  };
}

function distanceErrorOf(distance: NumberRecipe | null, error: NumberRecipe | null): Recipe['distanceError'] {
  if (!distance || !error) return null;
  const ofModulus = distance.conversion.rule === 'distanceModulus' || error.conversion.rule === 'distanceModulus';
  return {
    ofModulus,
    recipe: ofModulus ? { ...error, conversion: { factor: 1 }, range: [Number.MIN_VALUE, 5] } : error,
  };
}

const FRAMES: Readonly<Record<ResolvedSettings['frame'], SkyFrame>> = {
  icrs: 'icrs',
  fk5: 'fk5',
  fk4: 'b1950',
  galactic: 'galactic',
};

function positionOf(resolved: ResolvedSettings, indexOf: (name: string) => number): PositionRecipe {
  const frame = FRAMES[resolved.frame];
  const axis = (role: ColumnRole): AxisRecipe | undefined => {
    const column = resolved.columns[role];
    if (column === null) return undefined;
    return {
      index: indexOf(column),
      column,
      factor: conversionOf('angle', resolved.units[role] ?? 'deg')?.factor ?? 1,
    };
  };
  const ra = axis('ra');
  const dec = axis('dec');
  if (ra && dec) return { form: 'axes', ra, dec, frame };
  const parts = {
    raHours: axis('raHours'),
    raMinutes: axis('raMinutes'),
    raSeconds: axis('raSeconds'),
    decSign: axis('decSign'),
    decDegrees: axis('decDegrees'),
    decMinutes: axis('decMinutes'),
    decSeconds: axis('decSeconds'),
  };
  return { form: 'split', parts: parts as Extract<PositionRecipe, { form: 'split' }>['parts'], frame };
}
