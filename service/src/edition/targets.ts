import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import type { BandLimit } from '@eremite/shared/contracts/verdict';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { formatDeclination, formatRightAscension } from '@eremite/shared/science/sky/sexagesimal-format';
import { utf8Pieces } from '../tables/writers/utf8-pieces.ts';

export interface Target {
  rank: number;
  item: VerdictItem;
  limits: readonly BandLimit[];
  searchRadiusArcsec: number;
  /** Product the list is ranked by. */
  priority: number;
  reason: string;
  nullResult: string;
}

interface Field {
  name: string;
  width: number;
  about: string;
  /** Numbers stand right. */
  right?: boolean;
  text: (target: Target) => string;
}

/**
 * Mean surface brightness within the effective radius of a source at a limit.
 *
 * @param magnitude total
 * @param radiusArcsec effective radius, which holds half the light
 * @returns mag per square arcsec: m + 2.5 log10(2 pi r_e^2), Graham & Driver (2005), PASA 22, 118, eq. 9
 */
export function meanSurfaceBrightness(magnitude: number, radiusArcsec: number): number {
  return magnitude + 2.5 * Math.log10(2 * Math.PI * radiusArcsec ** 2);
}

/** The band that says most: testable ones first, then the likeliest to have shown an ordinary counterpart. */
function tellingLimit(limits: readonly BandLimit[]): BandLimit | undefined {
  return [...limits].sort(
    (a, b) => Number(b.testable) - Number(a.testable) || (b.completeness ?? -1) - (a.completeness ?? -1),
  )[0];
}

const figure = (value: number | null | undefined, decimals: number): string =>
  value === null || value === undefined || !Number.isFinite(value) ? '-' : value.toFixed(decimals);

const FIELDS: readonly Field[] = [
  { name: 'rank', width: 4, about: 'place on the list, 1 first', right: true, text: ({ rank }) => String(rank) },
  {
    name: 'priority',
    width: 8,
    about: 'P(none) x P(no neighbour) x the smaller stability, 0 to 1',
    right: true,
    text: ({ priority }) => priority.toFixed(4),
  },
  { name: 'name', width: 28, about: 'name in the HI list', text: ({ item }) => item.name },
  {
    name: 'ra',
    width: 11,
    about: 'right ascension, hh:mm:ss.ss',
    text: ({ item }) => formatRightAscension(item.raDeg, 2),
  },
  { name: 'dec', width: 11, about: 'declination, +dd:mm:ss.s', text: ({ item }) => formatDeclination(item.decDeg, 1) },
  { name: 'equinox', width: 7, about: 'J2000: the positions are ICRS', text: () => 'J2000' },
  {
    name: 'radius',
    width: 7,
    about: 'arcsec about the HI centroid that hold the true position',
    right: true,
    text: ({ searchRadiusArcsec }) => figure(searchRadiusArcsec, 1),
  },
  {
    name: 'cz',
    width: 8,
    about: 'km/s, optical convention, barycentric',
    right: true,
    text: ({ item }) => figure(item.velocityKms, 1),
  },
  {
    name: 'band',
    width: 5,
    about: 'of the limits: the band that would most likely have shown an ordinary counterpart',
    text: ({ limits }) => tellingLimit(limits)?.band ?? '-',
  },
  {
    name: 'mag_lim',
    width: 8,
    about: 'mag, fainter than this: total magnitude reached for sources of the largest radius',
    right: true,
    text: ({ limits }) => limited(limits)?.magnitude ?? '-',
  },
  {
    name: 'sb_lim',
    width: 8,
    about: 'mag/arcsec2, fainter than this: mean within that radius',
    right: true,
    text: ({ limits }) => limited(limits)?.brightness ?? '-',
  },
  {
    name: 'starlight',
    width: 12,
    about: 'settled verdict',
    text: ({ item }) => item.settled?.starlight ?? item.starlight,
  },
  {
    name: 'surroundings',
    width: 12,
    about: 'settled verdict',
    text: ({ item }) => item.settled?.surroundings ?? item.surroundings,
  },
];

function limited(limits: readonly BandLimit[]): { magnitude: string; brightness: string } | undefined {
  const faintest = tellingLimit(limits)?.depthExtended.at(-1);
  if (!faintest) return undefined;
  const { magnitude, radiusArcsec } = faintest;
  return {
    magnitude: `>${magnitude.toFixed(2)}`,
    brightness: `>${meanSurfaceBrightness(magnitude, radiusArcsec).toFixed(2)}`,
  };
}

/**
 * A target list for observers in a plain layout of our own: `#` lines say what it is and describe each field, then one
 * line a target, fields in fixed places between ` | `, `-` for what is not known. Reason and what a null result would
 * prove stand in `#` lines under the target.
 */
export function writeTargets(targets: AsyncIterable<Target>, description: string): AsyncIterable<Uint8Array> {
  return utf8Pieces(lines(targets, description));
}

async function* lines(targets: AsyncIterable<Target>, description: string): AsyncIterable<string> {
  yield `# ${oneLine(description)}\n# ${SCREENING_CAUTION}\n#\n# Fields, between " | ":\n`;
  for (const { name, about } of FIELDS) yield `#   ${name.padEnd(12)} ${about}\n`;
  yield `#\n# ${FIELDS.map(({ name, width, right }) => (right ? name.padStart(width) : name.padEnd(width)))
    .join(' | ')
    .trimEnd()}\n`;
  for await (const target of targets) {
    const cells = FIELDS.map(({ width, right, text }) => {
      const cell = oneLine(text(target)).replaceAll('|', '/');
      return right ? cell.padStart(width) : cell.padEnd(width);
    });
    yield `  ${cells.join(' | ').trimEnd()}\n`;
    if (target.reason) yield `#     why: ${oneLine(target.reason)}\n`;
    if (target.nullResult) yield `#     if nothing is found: ${oneLine(target.nullResult)}\n`;
  }
}

const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim();
