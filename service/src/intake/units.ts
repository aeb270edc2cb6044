/** What kind of quantity a role holds; each is converted to one unit, named in `CANONICAL_UNIT`. */
export type Quantity =
  | 'angle'
  | 'smallAngle'
  | 'velocity'
  | 'frequency'
  | 'lineFlux'
  | 'distance'
  | 'magnitude'
  | 'properMotion'
  | 'fluxDensity'
  | 'mass'
  | 'number';

export const CANONICAL_UNIT: Readonly<Record<Quantity, string>> = {
  angle: 'deg',
  smallAngle: 'arcsec',
  velocity: 'km/s',
  frequency: 'MHz',
  lineFlux: 'Jy km/s',
  distance: 'Mpc',
  magnitude: 'mag',
  properMotion: 'mas/yr',
  fluxDensity: 'mJy',
  mass: 'solMass',
  number: '',
};

/** How a number in a file's unit becomes one in the canonical unit: a factor, or one of the curved rules. */
export interface Conversion {
  factor: number;
  rule?: 'sexagesimal' | 'distanceModulus' | 'abFromFlux' | 'lineWidthFromFrequency' | 'fluxFromFrequency' | 'log10';
}

const HOUR_DEG = 15;
/** Spellings after `plain` below; the factor turns one into the canonical unit. */
const SPELLINGS: Readonly<Record<Quantity, readonly (readonly [RegExp, Conversion])[]>> = {
  angle: [
    [/^(deg(ree)?s?|°|d)$/, { factor: 1 }],
    [/^(h|hrs?|hours?|hourangle)$/, { factor: HOUR_DEG }],
    [/^rad(ians?)?$/, { factor: 180 / Math.PI }],
    [/^(arcmin|amin|')$/, { factor: 1 / 60 }],
    [/^(arcsec|asec|as|"|'')$/, { factor: 1 / 3600 }],
    [/^mas$/, { factor: 1 / 3_600_000 }],
    [
      /^("?h:m:s"?|"?d:m:s"?|hms|dms|hh:mm:ss(\.s+)?|[+-]?dd:mm:ss(\.s+)?|sexagesimal)$/,
      { factor: 1, rule: 'sexagesimal' },
    ],
  ],
  smallAngle: [
    [/^(arcsec(onds?)?|asec|as|"|'')$/, { factor: 1 }],
    [/^(arcmin(utes?)?|amin|')$/, { factor: 60 }],
    [/^(deg(ree)?s?|°)$/, { factor: 3600 }],
    [/^mas$/, { factor: 1e-3 }],
    [/^(uas|µas|μas)$/, { factor: 1e-6 }],
    [/^rad(ians?)?$/, { factor: (180 / Math.PI) * 3600 }],
  ],
  velocity: [
    [/^km\/s$/, { factor: 1 }],
    [/^m\/s$/, { factor: 1e-3 }],
    [/^cm\/s$/, { factor: 1e-5 }],
    [/^c$/, { factor: 299_792.458 }],
    [/^hz$/, { factor: 1e-6, rule: 'lineWidthFromFrequency' }],
    [/^khz$/, { factor: 1e-3, rule: 'lineWidthFromFrequency' }],
    [/^mhz$/, { factor: 1, rule: 'lineWidthFromFrequency' }],
  ],
  frequency: [
    [/^hz$/, { factor: 1e-6 }],
    [/^khz$/, { factor: 1e-3 }],
    [/^mhz$/, { factor: 1 }],
    [/^ghz$/, { factor: 1e3 }],
  ],
  lineFlux: [
    [/^jykm\/s$/, { factor: 1 }],
    [/^mjykm\/s$/, { factor: 1e-3 }],
    [/^jym\/s$/, { factor: 1e-3 }],
    [/^jyhz$/, { factor: 1, rule: 'fluxFromFrequency' }],
    [/^jykhz$/, { factor: 1e3, rule: 'fluxFromFrequency' }],
    [/^jymhz$/, { factor: 1e6, rule: 'fluxFromFrequency' }],
    [/^mjyhz$/, { factor: 1e-3, rule: 'fluxFromFrequency' }],
  ],
  distance: [
    [/^mpc$/, { factor: 1 }],
    [/^kpc$/, { factor: 1e-3 }],
    [/^pc$/, { factor: 1e-6 }],
    [/^gpc$/, { factor: 1e3 }],
    [/^mag$/, { factor: 1, rule: 'distanceModulus' }],
  ],
  magnitude: [
    [/^(mag|abmag|vegamag|mag\(ab\)|mag\(vega\))$/, { factor: 1 }],
    [/^(mmag|millimag)$/, { factor: 1e-3 }],
    [/^(nanomaggy|nanomaggies|nmgy|nmaggy)$/, { factor: 3.631e-6, rule: 'abFromFlux' }],
    [/^jy$/, { factor: 1, rule: 'abFromFlux' }],
    [/^mjy$/, { factor: 1e-3, rule: 'abFromFlux' }],
    [/^(ujy|µjy|μjy|microjy)$/, { factor: 1e-6, rule: 'abFromFlux' }],
  ],
  properMotion: [
    [/^mas\/(yr|year|a)$/, { factor: 1 }],
    [/^(arcsec|as|")\/(yr|year|a)$/, { factor: 1e3 }],
    [/^deg\/(yr|year|a)$/, { factor: 3.6e6 }],
  ],
  fluxDensity: [
    [/^mjy(\/beam)?$/, { factor: 1 }],
    [/^jy(\/beam)?$/, { factor: 1e3 }],
    [/^(ujy|µjy|μjy)(\/beam)?$/, { factor: 1e-3 }],
  ],
  mass: [
    [/^(sol(mass|\.mass)?|msun|m☉|m_sun|msol|solmass)$/, { factor: 1 }],
    [/^(\[(sol(mass)?|msun|solmass)\]|dex\((sol(mass)?|msun)\)|log\(?msun\)?|dex)$/, { factor: 1, rule: 'log10' }],
  ],
  number: [],
};

/** One spelling out of many: "km s**-1", "km.s-1", "km/sec" and "kms-1" are all "km/s". */
function plain(unit: string): string {
  return unit
    .trim()
    .replace(/^\((.*)\)$/, '$1')
    .replace(/^\[([^\]]*\/[^\]]*)\]$/, '$1')
    .toLowerCase()
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/\s*\/\s*sec(ond)?s?\b/g, '/s')
    .replace(/[\s.*·_]*(s|yr|year|a)\s*(\^|\*\*)?\s*[{(]?-1[)}]?/g, '/$1')
    .replace(/(km|m)ps\b/g, '$1/s')
    .replace(/\bkms\b/g, 'km/s')
    .replace(/[\s.*·_]+/g, '');
}

/**
 * Conversion of a unit, however it is spelt, to the canonical unit of a quantity.
 *
 * @param unit for example "deg", "km.s-1", "Jy km/s", "kpc", "mag" for a distance modulus
 * @returns undefined where the unit is unknown or of another quantity
 */
export function conversionOf(quantity: Quantity, unit: string): Conversion | undefined {
  if (quantity === 'number') return { factor: 1 };
  if (quantity === 'mass' && /^\[.*\]$/.test(unit.trim())) return { factor: 1, rule: 'log10' };
  const text = plain(unit);
  return SPELLINGS[quantity].find(([spelling]) => spelling.test(text))?.[1];
}
