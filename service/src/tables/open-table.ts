import { openContent } from './bytes/content.ts';
import { asUtf8 } from './bytes/encoding.ts';
import { openDelimited } from './readers/delimited.ts';
import { isFits, openFits } from './readers/fits.ts';
import { isVotable, openVotable } from './readers/votable.ts';
import { refuseOtherFormats } from './readers/other-formats.ts';
import { type ByteSource, DEFAULT_LIMITS, type OpenTable, type ReaderLimits } from './table.ts';

export interface OpenOptions {
  /** The ReadMe that describes a journal's data file, when it comes apart from it. */
  readMe?: ByteSource;
}

/**
 * Recognises the format of a file by its content and reads its head.
 * @throws TableError when it is no table a reader knows, with the place and the mend.
 */
export async function openTable(
  source: ByteSource,
  limits: Partial<ReaderLimits> = {},
  _options: OpenOptions = {},
): Promise<OpenTable> {
  const bounds = { ...DEFAULT_LIMITS, ...limits };
  const content = await openContent(source, bounds);
  refuseOtherFormats(content.head);
  if (isFits(content.head)) return openFits(content, bounds);
  const text = asUtf8(content);
  if (isVotable(text.head)) return openVotable(text, bounds);
  return openDelimited(text, bounds);
}
