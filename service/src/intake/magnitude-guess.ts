import { bandOf } from '@eremite/shared/science/photometry/band-of';
import type { ColumnFacts } from '../tables/table.ts';
import type { ColumnSample } from './sample.ts';
import { conversionOf } from './units.ts';

export interface BandGuess {
  band: string;
  confidence: number;
}

/** Bands said by a UCD; the coarse UCD wavebands of the optical do not tell Cousins R from SDSS r and are left out. */
const UCD_BANDS: readonly [RegExp, string][] = [
  [/em\.uv\.100-200nm|em\.uv\.fuv/, 'FUV'],
  [/em\.uv\.200-300nm|em\.uv\.nuv/, 'NUV'],
  [/em\.opt\.b\b/, 'B'],
  [/em\.opt\.v\b/, 'V'],
  [/em\.ir\.j\b/, 'J'],
  [/em\.ir\.h\b/, 'H'],
  [/em\.ir\.k\b/, 'Ks'],
  [/em\.ir\.3-4um/, 'W1'],
  [/em\.ir\.4-8um/, 'W2'],
  [/em\.ir\.8-15um/, 'W3'],
  [/em\.ir\.15-30um/, 'W4'],
];
/** Uppercase M with a separator is an absolute magnitude, which says nothing of what was seen. */
const ABSOLUTE = /^M[_ ]|abs/;
const DERIVED =
  /(^|[^a-z])(n|num|flag|ext|extinction|a|ebv|color|colour|ref|depth|snr|fwhm|seeing|re|r50|r90|pa|ba|lim)([^a-z]|$)/i;

/**
 * Band of an apparent magnitude column, if the column looks like one.
 *
 * A bare letter (`r`, `z`) or a UCD needs values that can be magnitudes; a name with "mag" in it needs no more.
 */
export function guessBand(column: ColumnFacts, sample: ColumnSample): BandGuess | undefined {
  const name = column.name.trim();
  const ucd = (column.ucd ?? '').toLowerCase();
  if (ABSOLUTE.test(name) || /^(stat|phys|phot\.mag;?.*(abs|sb)|phot\.color|meta)/.test(ucd)) return undefined;
  if (column.unit && !conversionOf('magnitude', column.unit)) return undefined;
  const band = bandOf(name) ?? (/^phot\.mag/.test(ucd) ? UCD_BANDS.find(([word]) => word.test(ucd))?.[1] : undefined);
  if (band === undefined) return undefined;
  const possible = sample.numbers > 0 && sample.median > 3 && sample.median < 35 && sample.texts <= sample.numbers;
  if (sample.numbers > 0 && !possible) return undefined;
  if (/^phot\.mag/.test(ucd)) return { band, confidence: 0.96 };
  if (/mag|mpro|petro|model|kron|psf/i.test(name)) return { band, confidence: DERIVED.test(name) ? 0.5 : 0.9 };
  if (column.unit) return { band, confidence: 0.85 };
  if (/^(FUV|NUV|W[1-4]|Ks?|[JH])$/.test(name)) return { band, confidence: possible ? 0.85 : 0.6 };
  return possible && !DERIVED.test(name) ? { band, confidence: name === 'z' ? 0.65 : 0.7 } : undefined;
}
