/** A column name taken apart: what it measures, the unit it names, and whether it is an error or a limit flag. */
export interface NameParts {
  /** Lower case, punctuation as single underscores, unit taken off: "cz" of "CZ [km/s]" and of "cz_kms". */
  base: string;
  /** Unit said by the name. */
  unit?: string;
  error: boolean;
  limit: boolean;
}

const UNIT_SUFFIXES: readonly [RegExp, string][] = [
  [/_(jy_?km_?s|jykms)$/, 'Jy km/s'],
  [/_(mjy_?km_?s|mjykms)$/, 'mJy km/s'],
  [/_(jy_?hz)$/, 'Jy Hz'],
  [/_(km_?s|kms|kmps|km_?per_?s|km_?sec)$/, 'km/s'],
  [/_(m_?s|ms|mps)$/, 'm/s'],
  [/_(mas_?yr|masyr)$/, 'mas/yr'],
  [/_(deg|degrees?)$/, 'deg'],
  [/_(hours?|hrs?)$/, 'h'],
  [/_(arcsec|asec)$/, 'arcsec'],
  [/_(arcmin|amin)$/, 'arcmin'],
  [/_mas$/, 'mas'],
  [/_mpc$/, 'Mpc'],
  [/_kpc$/, 'kpc'],
  [/_ghz$/, 'GHz'],
  [/_mhz$/, 'MHz'],
  [/_hz$/, 'Hz'],
  [/_mjy$/, 'mJy'],
];
const ERROR_PREFIX = /^(e_|err_|error_|sig_|sigma_|unc_|u_|d_(?=[a-z]{2}))/;
const ERROR_SUFFIX = /(_err|_error|_unc|_uncertainty|_e|(?<=[a-z0-9])err)$/;
const LIMIT = /^l_|_(limit_?flag|lim_?flag|uplim|upper_?limit|is_?limit)$/;

/** Names of a distance modulus, which says its unit: mag. */
export const DISTANCE_MODULUS = /^(dm|mod|distance_?modulus|dist_?mod(ulus)?)$/;

/** Takes a column name apart. A unit in brackets ("cz [km/s]", "dist (Mpc)") is handed over as it stands. */
export function nameParts(name: string): NameParts {
  let unit: string | undefined;
  let text = name.trim();
  const bracket = /^(.+?)\s*[[(]([^\])]+)[\])]$/.exec(text);
  if (bracket) [text, unit] = [bracket[1]!, bracket[2]!];
  let base = text.toLowerCase().replace(/[^a-z0-9-]+/g, '_');
  if (/^(de|dec)-$/.test(base)) return { base, error: false, limit: false };
  base = base.replace(/-/g, '_').replace(/_+/g, '_').replace(/_$/, '');
  for (const [suffix, said] of unit ? [] : UNIT_SUFFIXES) {
    if (!suffix.test(base)) continue;
    base = base.replace(suffix, '');
    unit = said;
    break;
  }
  const limit = LIMIT.test(base);
  if (limit) base = base.replace(LIMIT, '');
  const error =
    !limit &&
    !/^(e_?pos|e_?maj|e_?b_?v|sigma_?(v|pos)|sig_?v|d_lum)$/.test(base) &&
    (ERROR_PREFIX.test(base) || ERROR_SUFFIX.test(base));
  if (error) base = (ERROR_PREFIX.test(base) ? base.replace(ERROR_PREFIX, '') : base.replace(ERROR_SUFFIX, '')) || base;
  if (unit === undefined && !error && DISTANCE_MODULUS.test(base)) unit = 'mag';
  return { base, ...(unit === undefined ? {} : { unit }), error, limit };
}

/** Names nearest to one that does not exist, best first, none that is unlike. */
export function nearNames(wanted: string, names: readonly string[], most = 3): string[] {
  const key = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, '');
  const target = key(wanted);
  return names
    .map((name) => ({ name, far: distance(target, key(name)) }))
    .filter(({ name, far }) => far <= Math.max(1, Math.ceil(Math.min(target.length, key(name).length) / 2)))
    .sort((a, b) => a.far - b.far || a.name.length - b.name.length)
    .slice(0, most)
    .map(({ name }) => name);
}

/** Edits that turn one text into the other (Levenshtein); a name that begins with the other counts as one edit. */
function distance(a: string, b: string): number {
  if (a !== b && a.length > 1 && b.length > 1 && (a.startsWith(b) || b.startsWith(a))) return 1;
  let row = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      next[j] = Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1));
    }
    row = next;
  }
  return row[b.length]!;
}
