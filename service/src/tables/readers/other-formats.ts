import { TableError } from '../table.ts';

const AS_CSV = 'Save the table as CSV, VOTable or FITS and upload that.';

/** First bytes of files that are often mistaken for tables, or hold tables in a way that is not read here. */
const OTHERS: { starts: RegExp; what: string; mend: string }[] = [
  {
    starts: /^PK\x03\x04/,
    what: 'a ZIP archive or spreadsheet workbook',
    mend: 'Save the sheet as CSV and upload that.',
  },
  { starts: /^BZh\d/, what: 'packed with bzip2', mend: 'Unpack it, or pack it with gzip.' },
  { starts: /^\xfd7zXZ/, what: 'packed with xz', mend: 'Unpack it, or pack it with gzip.' },
  { starts: /^\x28\xb5\x2f\xfd/, what: 'packed with zstd', mend: 'Unpack it, or pack it with gzip.' },
  { starts: /^\x1f\x8b/, what: 'packed with gzip twice', mend: 'Unpack it once.' },
  { starts: /^\x89HDF/, what: 'an HDF5 file', mend: AS_CSV },
  { starts: /^%PDF/, what: 'a PDF document', mend: AS_CSV },
  { starts: /^PAR1/, what: 'a Parquet file', mend: AS_CSV },
  { starts: /^SQLite format/, what: 'a database file', mend: AS_CSV },
  { starts: /^(\x89PNG|\xff\xd8\xff|GIF8)/, what: 'a picture', mend: AS_CSV },
  { starts: /^\xd0\xcf\x11\xe0/, what: 'an old spreadsheet workbook', mend: 'Save the sheet as CSV and upload that.' },
  { starts: /^(\xef\xbb\xbf)?\s*(<!doctype html|<html)/i, what: 'a web page', mend: AS_CSV },
  { starts: /^(\xef\xbb\xbf)?\s*\{\s*("|\})|^\s*\[\s*[[{"]/, what: 'JSON', mend: AS_CSV },
  { starts: /^\s*(%[^\n]*\n\s*)*\\(begin|documentclass|tablehead)/, what: 'LaTeX source', mend: AS_CSV },
];

/** Says clearly what a file is when it is none of the table formats. */
export function refuseOtherFormats(head: Buffer): void {
  const start = head.toString('latin1', 0, 1024);
  const other = OTHERS.find(({ starts }) => starts.test(start));
  if (other) throw new TableError('unsupported', `The file is ${other.what}, not a table.`, other.mend, { byte: 0 });
}
