import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { CatalogueKind } from '@eremite/shared/contracts/words';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import { bandOf } from '@eremite/shared/science/photometry/band-of';
import type { TableFacts } from '../tables/table.ts';
import { type Guess, guessRoles } from './guess-roles.ts';
import { nameParts } from './name-parts.ts';
import { findColumn, type Remarks, resolveColumns, SPLIT_ROLES } from './resolve-columns.ts';
import { resolveBands } from './resolve-bands.ts';
import { resolveUnits } from './resolve-units.ts';
import type { ResolvedSettings, SettingsFault } from './resolved.ts';
import type { ColumnSample } from './sample.ts';
import { conversionOf } from './units.ts';

export interface Resolution {
  resolved: ResolvedSettings;
  guesses: Guess[];
  /** `ask` must be answered before publishing; a plan takes what `resolved` holds. */
  questions: SettingsQuestion[];
  /** Settings that cannot be carried out: nothing can be read until they are mended. */
  faults: SettingsFault[];
}

/** Position error of a catalogue that states none, 1-D, arcsec. Common practice for optical positions. */
export const DEFAULT_POSITION_ERROR_ARCSEC = 0.2;

/**
 * Turns what a person set, what the columns look like and the documented defaults into settings with nothing left
 * open. Nothing is assumed in silence: each default taken becomes a sentence.
 */
export function resolveSettings(
  settings: IntakeSettings,
  table: TableFacts,
  samples: readonly ColumnSample[],
): Resolution {
  const remarks: Remarks = { questions: [], faults: [] };
  const guesses = guessRoles(table.columns, samples);
  const names = table.columns.map(({ name }) => name);
  const byName = new Map(table.columns.map((facts, i) => [facts.name, { facts, sample: samples[i]! }]));
  const kind = resolveKind(settings, guesses, remarks);
  const columns = resolveColumns(settings, names, guesses, kind, remarks);
  askForPosition(columns, names, settings, remarks);
  const resolved: ResolvedSettings = {
    table: table.index,
    kind,
    name: settings.name || table.name,
    columns,
    units: resolveUnits(settings, columns, byName, remarks),
    frame: resolveFrame(settings, table, remarks),
    velocity: resolveVelocity(settings, columns, byName, remarks),
    errorMeaning: settings.errorMeaning ?? 'sigma1d',
    positionErrorArcsec: settings.positionErrorArcsec ?? null,
    beamArcsec: settings.beamArcsec ? { ...settings.beamArcsec, angleDeg: settings.beamArcsec.angleDeg ?? 0 } : null,
    distanceKind: settings.distanceKind ?? 'angular',
    bands: resolveBands(settings, columns.magnitudes, columns.reddening !== null, remarks),
    redshiftDepth: settings.redshiftDepth ?? null,
    missing: settings.missing ?? [],
    keep: resolveKeep(settings, names, remarks),
    footprint: settings.footprint ?? { type: 'rows' },
    reference: settings.reference ?? '',
    ...(settings.supersedes ? { supersedes: settings.supersedes } : {}),
    ...(settings.acceptTruncated ? { acceptTruncated: true } : {}),
    ...(settings.mergeDuplicates && kind === 'hi' ? { mergeDuplicates: true } : {}),
    ...(settings.overlapArcsec === undefined ? {} : { overlapArcsec: settings.overlapArcsec }),
    ...(settings.keepApart?.length && kind === 'hi' ? { keepApart: settings.keepApart } : {}),
  };
  for (const { band, column } of columns.magnitudes) {
    const unit = resolved.units[`magnitude:${band}`] ?? 'mag';
    const known = resolved.bands.find(({ name }) => name === band)!;
    if (conversionOf('magnitude', unit)?.rule !== 'abFromFlux') continue;
    known.system = 'AB';
    remarks.questions.push({
      level: 'assumed',
      pointer: '/bands',
      text: `"${column}" holds fluxes (${unit}): they become AB magnitudes.`,
    });
  }
  if (resolved.redshiftDepth) {
    resolved.redshiftDepth = {
      ...resolved.redshiftDepth,
      band: bandOf(resolved.redshiftDepth.band) ?? resolved.redshiftDepth.band,
    };
  }
  resolveErrors(settings, resolved, remarks);
  return { resolved, guesses, ...remarks };
}

function resolveKind(settings: IntakeSettings, guesses: readonly Guess[], { questions }: Remarks): CatalogueKind {
  if (settings.kind) return settings.kind;
  const roles = guesses.map(({ role }) => role);
  const regimes = roles
    .filter((role) => role.startsWith('magnitude:'))
    .map((role) => BANDS[role.slice('magnitude:'.length) as BandId]?.regime);
  const line = roles.includes('width50') || roles.includes('width20') || roles.includes('flux');
  const common = (['optical', 'infrared', 'ultraviolet'] as const).find((regime) => regimes.includes(regime));
  const guess = line ? 'hi' : roles.includes('memberCount') ? 'groups' : common;
  questions.push({
    level: 'ask',
    pointer: '/kind',
    text: guess
      ? `What kind of table is it? By its columns it looks ${guess === 'hi' ? 'like a list of HI detections' : `like one of kind ${guess}`}.`
      : 'What kind of table is it: hi, optical, infrared, ultraviolet, continuum, stars or groups?',
  });
  return guess ?? 'optical';
}

function askForPosition(
  columns: ResolvedSettings['columns'],
  names: string[],
  settings: IntakeSettings,
  { questions, faults }: Remarks,
): void {
  const split = ['raHours', 'raMinutes', 'decDegrees', 'decMinutes'].every(
    (role) => columns[role as 'raHours'] !== null,
  );
  if (split && columns.ra === null && columns.dec === null) return;
  for (const role of SPLIT_ROLES) columns[role] = null;
  for (const [role, says] of [
    ['ra', 'right ascension'],
    ['dec', 'declination'],
  ] as const) {
    if (columns[role] !== null || faults.some(({ pointer }) => pointer === `/columns/${role}`)) continue;
    const list = names.slice(0, 12).join(', ') + (names.length > 12 ? ', …' : '');
    const text =
      settings.columns?.[role] === null ? `A column for the ${says} is needed.` : `Which column holds the ${says}?`;
    questions.push({
      level: 'ask',
      pointer: `/columns/${role}`,
      text: `${text} The table has ${list || 'no columns'}.`,
    });
  }
}

const FRAME_WORDS: readonly [RegExp, ResolvedSettings['frame']][] = [
  [/icrs/i, 'icrs'],
  [/fk5/i, 'fk5'],
  [/fk4|b1950/i, 'fk4'],
  [/^gal/i, 'galactic'],
];

function resolveFrame(settings: IntakeSettings, table: TableFacts, { questions }: Remarks): ResolvedSettings['frame'] {
  if (settings.frame) return settings.frame;
  const stated = table.frame && FRAME_WORDS.find(([word]) => word.test(table.frame!))?.[1];
  if (stated) return stated;
  questions.push(
    table.frame
      ? {
          level: 'ask',
          pointer: '/frame',
          text: `The file says its positions are in the frame "${table.frame}", which is not read here: are they ICRS, FK5, FK4 or Galactic?`,
        }
      : { level: 'assumed', pointer: '/frame', text: 'The frame of the positions is not stated: ICRS is assumed.' },
  );
  return 'icrs';
}

function resolveVelocity(
  settings: IntakeSettings,
  columns: ResolvedSettings['columns'],
  table: ReadonlyMap<string, { facts: { ucd?: string } }>,
  { questions }: Remarks,
): ResolvedSettings['velocity'] {
  const column = columns.velocity ?? columns.redshift ?? columns.frequency;
  const ucd = (column && table.get(column)?.facts.ucd?.toLowerCase()) || '';
  const base = column ? nameParts(column).base : '';
  const saysRadio = columns.velocity !== null && /dopplerveloc\.radio/.test(ucd);
  const saysLsr = /pos\.lsr/.test(ucd) || /lsr/.test(base);
  const saysCmb = /cmb/.test(base);
  const convention = settings.velocity?.convention ?? (saysRadio ? 'radio' : 'optical');
  const frame = settings.velocity?.frame ?? (saysLsr ? 'lsrk' : saysCmb ? 'cmb' : 'barycentric');
  if (column) {
    const open: string[] = [];
    if (settings.velocity?.convention === undefined && columns.velocity !== null)
      open.push(`the ${convention} convention`);
    if (settings.velocity?.frame === undefined) open.push(`the ${frame} frame`);
    if (open.length) {
      questions.push({
        level: 'assumed',
        pointer: '/velocity',
        text: `What "${column}" refers to is not stated: ${open.join(' and ')} assumed.`,
      });
    }
  }
  return { convention, frame };
}

function resolveKeep(settings: IntakeSettings, names: readonly string[], remarks: Remarks): ResolvedSettings['keep'] {
  return (settings.keep ?? []).map(({ column, values }, i) => ({
    column: findColumn(names, column, `/keep/${i}/column`, remarks) ?? column,
    values,
  }));
}

function resolveErrors(settings: IntakeSettings, resolved: ResolvedSettings, { questions }: Remarks): void {
  const say = (pointer: string, text: string) => questions.push({ level: 'assumed', pointer, text });
  const column = resolved.columns.positionError;
  if (settings.errorMeaning === undefined && (column !== null || resolved.positionErrorArcsec !== null)) {
    say(
      '/errorMeaning',
      `What the position error means is not stated: one standard deviation along one axis is assumed.`,
    );
  }
  if (resolved.kind === 'hi') {
    const beam = resolved.beamArcsec !== null || resolved.columns.beamMajor !== null;
    if (!beam && column === null && resolved.positionErrorArcsec === null) {
      say('/beamArcsec', 'Neither beam nor position error is stated: the default error of the criteria is used.');
    }
  } else if (column === null && resolved.positionErrorArcsec === null) {
    resolved.positionErrorArcsec = DEFAULT_POSITION_ERROR_ARCSEC;
    resolved.errorMeaning = 'sigma1d';
    say(
      '/positionErrorArcsec',
      `No position error is stated: ${DEFAULT_POSITION_ERROR_ARCSEC} arcsec along each axis is assumed.`,
    );
  }
  if (settings.distanceKind === undefined && resolved.columns.distance !== null) {
    say(
      '/distanceKind',
      `Distances of "${resolved.columns.distance}" are used as given, for projection and for luminosity alike.`,
    );
  }
}
