import type { VelocityConvention } from '@eremite/shared/science/velocity/conventions';
import type { VelocityFrame } from '@eremite/shared/science/velocity/frames';
import type { FluxUnit } from './spectrum.ts';

/** What a column or an axis is called, as files have it. */
export interface Named {
  name: string;
  unit?: string | undefined;
  ucd?: string | undefined;
}

interface AxisMeaning {
  /** To km/s, or to MHz for frequencies. */
  factor: number;
  /** Undefined where the words do not say which kind of velocity it is. */
  convention: VelocityConvention | undefined;
  frame: VelocityFrame | 'topocentric' | undefined;
}

const VELOCITY: Readonly<Record<string, number>> = { 'km/s': 1, 'm/s': 1e-3 };
const FREQUENCY_MHZ: Readonly<Record<string, number>> = { hz: 1e-6, khz: 1e-3, mhz: 1, ghz: 1e3 };
const FLUX: Readonly<Record<string, { unit: FluxUnit; factor: number }>> = {
  jy: { unit: 'mJy', factor: 1e3 },
  mjy: { unit: 'mJy', factor: 1 },
  ujy: { unit: 'mJy', factor: 1e-3 },
  µjy: { unit: 'mJy', factor: 1e-3 },
  k: { unit: 'K', factor: 1 },
  mk: { unit: 'K', factor: 1e-3 },
};

/** `km s-1`, `km.s**-1` and `km s^-1` are `km/s`; what stands in brackets after a name is its unit. */
function unitOf({ name, unit }: Named): string {
  const bracketed =
    /[[(]([^\])]+)[\])]\s*$/.exec(name)?.[1] ?? /_(km\/?s|kms|m\/?s|[kMG]?hz|[mu]?jy|m?k)$/i.exec(name)?.[1];
  const text = (unit ?? bracketed ?? '').trim().toLowerCase();
  const plain = text.replace(/\/beam$|[ .]?beam(\*\*|\^)?-1$/, '').replace(/[ .*]*s(\*\*|\^)?-1$/, '/s');
  return plain === 'kms' ? 'km/s' : plain === 'ms' ? 'm/s' : plain;
}

const wordsOf = ({ name, ucd = '' }: Named) => `${name} ${ucd}`.toLowerCase().replace(/[^a-z0-9]+/g, ' ');

/** What a column is as a spectral axis; undefined where it is none. */
export function axisMeaning(named: Named): AxisMeaning | undefined {
  const unit = unitOf(named);
  const words = wordsOf(named);
  const frame = frameIn(words);
  const frequency = FREQUENCY_MHZ[unit];
  if (frequency !== undefined) return { factor: frequency, convention: 'frequency', frame };
  const isVelocity = /veloc|\bv\b|\bv(el|elo|opt|rad|hel|helio|lsr|lsrk|bary)\b|\bcz\b|\bfelo\b/.test(words);
  const factor = VELOCITY[unit] ?? (isVelocity && unit === '' ? 1 : undefined);
  if (factor === undefined) return undefined;
  const isOptical = /\bv?opt|\bcz\b|\bfelo\b/.test(words);
  const convention = isOptical ? 'optical' : /\bv?rad(io)?\b/.test(words) ? 'radio' : undefined;
  return { factor, convention, frame };
}

function frameIn(words: string): AxisMeaning['frame'] {
  if (/topo|geoc/.test(words)) return 'topocentric';
  if (/lsrd/.test(words)) return 'lsrd';
  if (/lsr/.test(words)) return 'lsrk';
  if (/bary/.test(words)) return 'barycentric';
  if (/hel/.test(words)) return 'heliocentric';
  return undefined;
}

/** What a column is as flux density; undefined where neither its unit nor its name says that it is one. */
export function fluxMeaning(named: Named): { unit: FluxUnit; factor: number } | 'unit missing' | undefined {
  const known = fluxUnit(unitOf(named));
  if (known) return known;
  const words = wordsOf(named);
  return /flux|intens|phot |spec|ampl|temp|\bs\b|^t_?(b|a|sys)?\b/.test(words) ? 'unit missing' : undefined;
}

/** A unit of flux density in words. */
export const fluxUnit = (text: string) =>
  FLUX[
    text
      .trim()
      .toLowerCase()
      .replace(/\/beam$/, '')
  ];

/** A velocity frame in the words of SPECSYS. Source: Greisen et al. (2006), A&A 446, 747, table 1. */
export const frameOfSpecsys = (text: string): AxisMeaning['frame'] =>
  (
    ({
      TOPOCENT: 'topocentric',
      GEOCENTR: 'topocentric',
      BARYCENT: 'barycentric',
      HELIOCEN: 'heliocentric',
      LSRK: 'lsrk',
      LSRD: 'lsrd',
    }) as const
  )[text.trim().toUpperCase() as 'LSRK'];
