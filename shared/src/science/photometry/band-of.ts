import { BANDS, BAND_IDS } from './bands.ts';
import type { BandId } from './bands.ts';

/** Words that go with a band in column names and say nothing of it. */
const PLAIN_WORDS =
  'mag|magnitude|apparent|app|extinction|corrected|dered|galex|sdss|2mass|twomass|allwise|unwise|catwise|wise|johnson|' +
  'cousins|bessell|gaia|phot|mean|cmodel|model|petro|kron|psf|mpro|total|auto|iso|band|filter|flux|ext|tot|m|ab|vega|limit|lim|depth';
/** The survey decides which g, r, i, z is meant. */
const SURVEY_WORDS: readonly [string, string][] = [
  ['ps1|panstarrs1?|starrs1?|pan', 'PS1 '],
  ['decam|decals|legacy|des|ls', 'DES '],
  ['lsst|rubin', 'LSST '],
];
const WHOLE_PLAIN = new RegExp(`^(${PLAIN_WORDS})$`, 'i');
/** Joined to the band without a separator, as in "gmag" or "W1mpro"; only words that cannot be part of a band. */
const JOINED = /^(magnitude|mag|petro|cmodel|model|psf|kron)|(magnitude|mag|mpro|petro|cmodel|model|psf|kron|band)$/i;
const JOINED_SURVEY = /^(ps1|decam|lsst)|(ps1|decam|lsst)$/i;

/**
 * Band that a column name or a person's word means.
 *
 * @param name for example "r", "R", "rmag", "mag_g", "W1mpro", "NUV", "K", "Pan-STARRS i"
 * @returns the band, or undefined where the name does not tell: never a guess
 *
 * A single letter keeps its case: r is SDSS r, R is Cousins R, G is Gaia G; a capital U, Z or Y names no band here. K and
 * Ks are both 2MASS Ks; y is Pan-STARRS y. A bare
 * small b, v or h is no band (latitude, velocity, hours), nor is anything that leaves a second word behind.
 */
export function bandOf(name: string): BandId | undefined {
  const text = name.trim();
  const exact = BAND_IDS.find((id) => id === text || BANDS[id].name.toLowerCase() === text.toLowerCase());
  if (exact) return exact;
  if (/^[bvh]$/.test(text)) return undefined;

  if (/^(gaia|phot)_?g/i.test(text)) return 'G';

  let survey = '';
  const rest: string[] = [];
  for (const token of text.split(/[^A-Za-z0-9]+/)) {
    if (!token || WHOLE_PLAIN.test(token)) continue;
    let word = token;
    const joined = JOINED_SURVEY.exec(word)?.[0];
    if (joined) word = word.replace(JOINED_SURVEY, '');
    survey = surveyOf(token) ?? (joined && surveyOf(joined)) ?? survey;
    if (surveyOf(token)) continue;
    while (JOINED.test(word)) word = word.replace(JOINED, '');
    if (word && !WHOLE_PLAIN.test(word)) rest.push(word);
  }
  return rest.length === 1 ? bandOfLetters(rest[0]!, survey) : undefined;
}

function surveyOf(token: string): string | undefined {
  return SURVEY_WORDS.find(([words]) => new RegExp(`^(${words})$`, 'i').test(token))?.[1];
}

function bandOfLetters(letters: string, survey: string): BandId | undefined {
  const upper = letters.toUpperCase();
  if (/^(FUV|NUV|W[1-4]|[BVJH])$/.test(upper)) return upper as BandId;
  if (/^KS?$/.test(upper)) return 'Ks';
  if (survey) return BAND_IDS.find((id) => id === survey + letters.toLowerCase());
  if (letters === 'y') return 'PS1 y';
  return /^([ugriz]|[RIG])$/.test(letters) ? (letters as BandId) : undefined;
}
