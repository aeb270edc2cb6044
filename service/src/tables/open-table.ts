import { openContent } from './bytes/content.ts';
import { asUtf8 } from './bytes/encoding.ts';
import { openDelimited } from './readers/delimited.ts';
import { isEcsv, openEcsv } from './readers/ecsv.ts';
import { isFits, openFits } from './readers/fits.ts';
import { isIpac, openIpac } from './readers/ipac.ts';
import { isMrt, openMrt, openWithReadMe } from './readers/mrt.ts';
import { refuseOtherFormats } from './readers/other-formats.ts';
import { isVotable, openVotable } from './readers/votable.ts';
import { type ByteSource, DEFAULT_LIMITS, type OpenTable, type ReaderLimits, TableError } from './table.ts';

export interface OpenOptions {
  /** The ReadMe that describes a journal's data file, when it comes apart from it. */
  readMe?: ByteSource;
}

/**
 * Recognises the format of a file by its content, unpacked if gzipped, and reads its head.
 * @throws TableError when it is no table a reader knows, with the place and the mend; never anything else.
 */
export async function openTable(
  source: ByteSource,
  limits: Partial<ReaderLimits> = {},
  options: OpenOptions = {},
): Promise<OpenTable> {
  try {
    return await recognise(source, { ...DEFAULT_LIMITS, ...limits }, options);
  } catch (error) {
    if (error instanceof TableError) throw error;
    const detail = error instanceof Error ? error.message : String(error);
    throw new TableError('unreadable', `The file could not be read (${detail}).`, 'Upload it again.', { byte: 0 });
  }
}

async function recognise(source: ByteSource, limits: ReaderLimits, { readMe }: OpenOptions): Promise<OpenTable> {
  const content = await openContent(source, limits);
  refuseOtherFormats(content.head);
  if (readMe !== undefined) return openWithReadMe(content, await openContent(readMe, limits), limits);
  if (isFits(content.head)) return openFits(content, limits);
  const text = asUtf8(content);
  if (isVotable(text.head)) return openVotable(text, limits);
  if (isEcsv(text.head)) return openEcsv(text, limits);
  if (isMrt(text.head)) return openMrt(content, limits);
  if (isIpac(text.head)) return openIpac(text, limits);
  return openDelimited(text, limits);
}
