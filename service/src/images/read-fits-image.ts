import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { toIcrs } from '@eremite/shared/science/sky/frames';
import { separation } from '@eremite/shared/science/sky/separation';
import { openContent } from '../tables/bytes/content.ts';
import { isFits } from '../tables/readers/fits.ts';
import type { FitsHeader } from '../tables/readers/fits-header.ts';
import { type FitsHdu, listHdus } from '../tables/readers/fits-hdus.ts';
import { type ByteSource, TableError } from '../tables/table.ts';
import type { ImageFacts, ImageLimits, SkyImage } from './image.ts';
import { readPixels } from './read-pixels.ts';
import { type HeaderWcs, readWcs } from './read-wcs.ts';

interface Found extends HeaderWcs {
  hdu: FitsHdu;
  width: number;
  height: number;
}

/**
 * Reads the first image of a FITS file, plain or gzipped, that has celestial coordinates.
 *
 * @throws TableError when there is none or it cannot be read, with what is wrong and the mend; memory for the pixels is
 * asked for only once the header is within the limits
 */
export async function readFitsImage(source: ByteSource, limits: ImageLimits): Promise<SkyImage> {
  const content = await openContent(source, limits);
  if (!isFits(content.head)) {
    const message = 'The file does not begin as FITS does (SIMPLE or XTENSION).';
    throw new TableError('unsupported', message, 'Upload a FITS image.', { byte: 0 });
  }
  const { hdus, notes } = await listHdus(content, limits);
  const found = choose(hdus);
  const pixels = found.width * found.height;
  if (pixels > limits.maxPixels) {
    const message = `The image has ${found.width} × ${found.height} pixels, more than the limit of ${limits.maxPixels}.`;
    throw new TableError('too-large', message, 'Cut out the part about the detection.', { byte: 0 });
  }
  const values = await readPixels(content, found.hdu, pixels, limits);
  const facts = factsOf(found, notes);
  judgeValues(values, found.hdu.header, facts.notes);
  return { facts, wcs: found.wcs, values };
}

/** The image with coordinates; what else there is decides only what is said when there is none. */
function choose(hdus: readonly FitsHdu[]): Found {
  let without: TableError | undefined;
  for (const hdu of hdus) {
    const { header, number } = hdu;
    if (header.values.get('ZIMAGE') === true) {
      const message = `The image in HDU ${number} is tile-compressed (ZIMAGE), which is not read.`;
      without ??= new TableError('unsupported', message, 'Unpack it (funpack), or pack it with gzip instead.', {
        byte: hdu.dataStart,
      });
    }
    const kind = header.text('XTENSION');
    if (kind !== undefined && kind !== 'IMAGE') continue;
    const axes = header.count('NAXIS', number, 0);
    if (axes === 0 || hdu.dataBytes === 0) continue;
    const sizes = Array.from({ length: axes }, (_, i) => header.count(`NAXIS${i + 1}`, number));
    const long = sizes.flatMap((size, i) => (size > 1 ? [i + 1] : []));
    if (long.length !== 2) {
      without ??= new TableError('unsupported', shapeFault(sizes, number), 'Cut one plane out of it.', { byte: 0 });
      continue;
    }
    const [first, second] = long as [number, number];
    const wcs = readWcs(header, [first, second]);
    if (wcs) return { ...wcs, hdu, width: sizes[first - 1]!, height: sizes[second - 1]! };
    const message = `The image in HDU ${number} has no celestial coordinates in its header (CTYPE1 and CTYPE2).`;
    without ??= new TableError('unsupported', message, 'Upload an image with world coordinates.', { byte: 0 });
  }
  throw (
    without ??
    new TableError('unsupported', 'The FITS file holds no image, only tables or headers.', 'Upload the image itself.', {
      byte: 0,
    })
  );
}

const shapeFault = (sizes: readonly number[], hdu: number) =>
  sizes.length < 2
    ? `The array in HDU ${hdu} has one axis (${sizes.join(' × ')}): it is no image.`
    : `The array in HDU ${hdu} has ${sizes.join(' × ')} elements: an image has two axes longer than 1.`;

function factsOf({ hdu, width, height, frame, projection, wcs, notes }: Found, fileNotes: string[]): ImageFacts {
  const { header } = hdu;
  const icrs = (x: number, y: number) => {
    const place = wcs.toSky(x, y);
    return place && toIcrs(frame, place.lon, place.lat);
  };
  const [x, y] = [(width + 1) / 2, (height + 1) / 2];
  const [middle, right, up] = [icrs(x, y), icrs(x + 1, y), icrs(x, y + 1)];
  if (!middle || !right || !up) {
    throw new TableError('bad-header', 'The middle of the image is not on the sky.', 'Check its coordinates.', {
      byte: 0,
    });
  }
  const from = (place: typeof middle) => separation(middle.lon, middle.lat, place.lon, place.lat);
  const corners = [icrs(0.5, 0.5), icrs(width + 0.5, 0.5), icrs(0.5, height + 0.5), icrs(width + 0.5, height + 0.5)];
  const reach = Math.max(0, ...corners.flatMap((corner) => (corner ? [from(corner)] : [])));
  const text = (keyword: string) => header.text(keyword) || null;
  return {
    width,
    height,
    projection,
    frame,
    raDeg: middle.lon / DEGREE,
    decDeg: middle.lat / DEGREE,
    pixelArcsec: Math.sqrt(from(right) * from(up)) / ARCSECOND,
    reachArcsec: reach / ARCSECOND,
    unit: text('BUNIT'),
    object: text('OBJECT'),
    filter: text('FILTER') ?? text('BAND'),
    zeroPointMag: zeroPoint(header),
    beam: beamOf(header),
    notes: [...fileNotes, ...notes],
  };
}

/** Keywords under which archives give the magnitude of a value of 1. Common practice; there is no standard for it. */
const ZERO_POINTS = ['MAGZERO', 'MAGZPT', 'MAGZP', 'ZEROPT', 'ZPTMAG', 'ZP'];

function zeroPoint(header: FitsHeader): number | null {
  for (const keyword of ZERO_POINTS) {
    const value = header.number(keyword);
    if (value !== undefined && value > 0 && value < 50) return value;
  }
  return null;
}

function beamOf(header: FitsHeader): ImageFacts['beam'] {
  const [major, minor] = [header.number('BMAJ'), header.number('BMIN')];
  if (major === undefined || minor === undefined || !(major > 0 && minor > 0)) return null;
  return { majorArcsec: major * 3600, minorArcsec: minor * 3600, angleDeg: header.number('BPA') ?? 0 };
}

/** Refuses an image without a value, and says when the values look as if their bytes stood in the wrong order. */
function judgeValues(values: Float32Array | Float64Array, header: FitsHeader, notes: string[]): void {
  let known = 0;
  let absurd = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    known++;
    const size = Math.abs(value);
    if (size > 1e30 || (size > 0 && size < 1e-34)) absurd++;
  }
  if (known === 0) {
    throw new TableError('bad-data', 'No pixel of the image has a value.', 'Upload the image that covers the place.', {
      byte: 0,
    });
  }
  if ((header.number('BITPIX') ?? 0) < 0 && absurd > 0.2 * known) {
    notes.push('Many values are of absurd size: the bytes may stand in the wrong order (FITS is big-endian).');
  }
}
