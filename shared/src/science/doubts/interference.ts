import { SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';
import { hydrogenFrequency } from './line-frequencies.ts';

/** A band in which a telescope meets interference. */
export interface InterferenceBand {
  name: string;
  lowMhz: number;
  highMhz: number;
}

/** Transmitters near the line, as a start for a user's own list. From memory; widths are nominal. */
export const COMMON_INTERFERENCE: readonly InterferenceBand[] = [
  { name: 'GPS L3', lowMhz: 1380.05, highMhz: 1382.05 },
  { name: 'surveillance radar 1350', lowMhz: 1347, highMhz: 1353 },
  { name: 'surveillance radar 1330', lowMhz: 1328, highMhz: 1332 },
  { name: 'surveillance radar 1310', lowMhz: 1308, highMhz: 1312 },
  { name: 'surveillance radar 1290', lowMhz: 1288, highMhz: 1292 },
  { name: 'Galileo E6', lowMhz: 1258.29, highMhz: 1299.21 },
  { name: 'BeiDou B3', lowMhz: 1258.29, highMhz: 1278.75 },
  { name: 'GLONASS L2', lowMhz: 1242, highMhz: 1249 },
  { name: 'GPS L2', lowMhz: 1217.37, highMhz: 1237.83 },
];

export interface InterferenceInput {
  /** Optical cz of the line, km/s; NaN where missing. */
  czKms: number;
  /** Whether cz is as observed at the telescope; a barycentric one may be up to 30 km/s off the frequency received. */
  topocentric: boolean;
  /** Width at half the peak and channel width, km/s; NaN where missing (then 0). */
  width50Kms: number;
  channelKms: number;
  bands: readonly InterferenceBand[];
}

/** Motion of the telescope against the barycentre, km/s. */
const EARTH_KMS = 31;

const RULE: DoubtRule = {
  name: 'interference',
  rule: `serious if the line is within W50/2 + 1 channel of a listed band; watch if within a further ${EARTH_KMS} km/s where the velocity is barycentric`,
  source: 'common practice; bands as listed by the survey',
};

/**
 * Doubt that the line was made by a transmitter.
 *
 * @param input line and the survey's list of bands
 * @returns the doubt; its value is the gap to the nearest band, km/s, zero inside it
 * @throws {DomainError} if a band ends below its start
 *
 * What repeats at one frequency in many directions is interference whatever the list says.
 *
 * Method: doubts.
 */
export function interference(input: InterferenceInput): Doubt {
  const { czKms, topocentric, width50Kms, channelKms, bands } = input;
  const wrong = bands.find((band) => !(band.lowMhz > 0 && band.highMhz >= band.lowMhz && band.highMhz < Infinity));
  if (wrong)
    throw new DomainError(`interference: band ${wrong.name} runs from ${wrong.lowMhz} to ${wrong.highMhz} MHz`);
  if (!Number.isFinite(czKms)) return doubt(RULE, 'not testable here', 'The detection has no velocity.');
  if (bands.length === 0) return doubt(RULE, 'not testable here', 'The survey lists no bands of interference.');

  const frequency = hydrogenFrequency(czKms);
  const gaps = bands.map(({ lowMhz, highMhz }) => {
    const mhz = Math.max(0, lowMhz - frequency, frequency - highMhz);
    return (SPEED_OF_LIGHT_KMS * mhz) / frequency;
  });
  const gap = Math.min(...gaps);
  const band = bands[gaps.indexOf(gap)]!;
  const reach = (width50Kms > 0 ? width50Kms / 2 : 0) + (channelKms > 0 ? channelKms : 0);
  const where = `The line at ${frequency.toFixed(2)} MHz is ${gap === 0 ? 'inside' : `${inWords(gap)} km/s from`} the band ${band.name}`;
  const grade = gap <= reach ? 'serious' : !topocentric && gap <= reach + EARTH_KMS ? 'watch' : 'clear';
  const advice = grade === 'clear' ? '' : '; a second spectrum decides';
  return doubt(RULE, grade, `${where}${advice}.`, gap, 'km/s');
}
