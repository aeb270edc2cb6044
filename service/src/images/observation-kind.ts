import type { Content } from '../tables/bytes/content.ts';
import { isFits } from '../tables/readers/fits.ts';
import { listHdus } from '../tables/readers/fits-hdus.ts';
import { type ReaderLimits, TableError } from '../tables/table.ts';

export type ObservationKind = 'image' | 'spectrum';

/** Whether a file is an image or a spectrum, by its content: a FITS array of two axes is an image, all else a spectrum. */
export async function observationKind(content: Content, limits: ReaderLimits): Promise<ObservationKind> {
  const picture = /^(\x89PNG|\xff\xd8\xff|GIF8|II\*\0|MM\0\*)/.exec(content.head.toString('latin1', 0, 8));
  if (picture) {
    const message = 'The file is a picture without values and coordinates.';
    throw new TableError('unsupported', message, 'Upload the FITS image it was made from.', { byte: 0 });
  }
  if (!isFits(content.head)) return 'spectrum';
  const { hdus } = await listHdus(content, limits);
  const hasImage = hdus.some(({ header, number, dataBytes }) => {
    if (header.values.get('ZIMAGE') === true) return true;
    const kind = header.text('XTENSION');
    if ((kind !== undefined && kind !== 'IMAGE') || dataBytes === 0) return false;
    const axes = header.count('NAXIS', number, 0);
    const sizes = Array.from({ length: axes }, (_, i) => header.count(`NAXIS${i + 1}`, number));
    return sizes.filter((size) => size > 1).length > 1;
  });
  return hasImage ? 'image' : 'spectrum';
}
