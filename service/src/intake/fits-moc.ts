import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { DomainError } from '@eremite/shared/science/domain-error';
import { Moc } from '@eremite/shared/science/sky/moc';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { openTable } from '../tables/open-table.ts';
import { type OpenTable, TableError } from '../tables/table.ts';
import type { SettingsFault } from './resolved.ts';
import { cellAt } from './sample.ts';

/** Header bytes searched for what the region says of itself. */
const HEAD_BYTES = 64 * 1024;
/** Cells or range edges read at most: a region of more is finer than anything here needs. */
const MOST_NUMBERS = 4_000_000;

/**
 * Reads a space MOC from a FITS binary table, either as NUNIQ numbers or as ranges at order 29.
 *
 * @throws {DomainError} where the table is no space MOC
 * @throws {TableError} where the file is no readable FITS table
 *
 * Source: IVOA MOC 2.0, section 4.3 (ORDERING = NUNIQ or RANGE, MOCORDER or MOCORD_S, MOCDIM).
 */
export async function readFitsMoc(bytes: Uint8Array): Promise<Moc> {
  const open = await openTable(memorySource(bytes));
  if (open.format !== 'fits') throw new DomainError(`MOC: expected a FITS file, found ${open.format}`);
  const head = Buffer.from(bytes.subarray(0, HEAD_BYTES)).toString('latin1');
  const card = (keyword: string) =>
    new RegExp(`${keyword.padEnd(8)}= *(?:'([^']*?) *'|(\\d+))`).exec(head)?.slice(1).find(Boolean);
  const dimension = card('MOCDIM');
  if (dimension !== undefined && dimension !== 'SPACE') {
    throw new DomainError(`MOC: expected a region of the sky, found one of ${dimension.toLowerCase()}`);
  }
  const frame = card('COORDSYS');
  if (frame !== undefined && !/^(C|ICRS|EQUATORIAL)/i.test(frame)) {
    throw new DomainError(`MOC: expected the frame ICRS (COORDSYS = C), found "${frame}"`);
  }
  const ordering = card('ORDERING') ?? open.tables[0]!.columns[0]!.name.toUpperCase();
  const numbers = await firstColumn(open);
  if (ordering === 'NUNIQ' || ordering === 'UNIQ') return Moc.fromUniq(numbers, orderOf(card('MOCORDER')));
  if (ordering !== 'RANGE' && ordering !== 'RANGE29') {
    throw new DomainError(`MOC: expected ORDERING = NUNIQ or RANGE, found "${ordering}"`);
  }
  return Moc.fromRanges29(orderOf(card('MOCORD_S') ?? card('MOCORDER')) ?? coarsest(numbers), numbers);
}

const orderOf = (text: string | undefined): number | undefined => (text === undefined ? undefined : Number(text));

/** Every number of the first column, in order; ranges of two to a row come as "start end". */
async function firstColumn(open: OpenTable): Promise<bigint[]> {
  const numbers: bigint[] = [];
  for await (const chunk of open.rows(0)) {
    for (let i = 0; i < chunk.rows; i++) {
      for (const word of cellAt(chunk.columns[0]!, i).split(/\s+/)) {
        if (!/^\d+$/.test(word)) throw new DomainError(`MOC: expected whole numbers, found "${word}"`);
        numbers.push(BigInt(word));
      }
    }
    if (numbers.length > MOST_NUMBERS) throw new DomainError(`MOC: more than ${MOST_NUMBERS} numbers; degrade it`);
  }
  return numbers;
}

/** The coarsest order whose cells make up the ranges. */
function coarsest(edges: readonly bigint[]): number {
  const bits = edges.reduce((all, edge) => all | edge, 0n);
  let order = 29;
  while (order > 0 && bits % (1n << BigInt(2 * (30 - order))) === 0n) order--;
  return order;
}

/** Settings with a region sent as a FITS file replaced by its text; what is wrong with it is added to the faults. */
export async function withReadMoc(settings: IntakeSettings, faults: SettingsFault[]): Promise<IntakeSettings> {
  const { type, value } = settings.footprint ?? {};
  const fits =
    type === 'moc' && typeof value === 'object' && value !== null && 'fits' in value ? value.fits : undefined;
  if (fits === undefined) return settings;
  try {
    if (typeof fits !== 'string') throw new DomainError('MOC: a FITS file is given as base64 text');
    const moc = await readFitsMoc(Buffer.from(fits, 'base64'));
    return { ...settings, footprint: { type: 'moc', value: moc.toAscii() } };
  } catch (error) {
    if (!(error instanceof DomainError || error instanceof TableError)) throw error;
    const mend = error instanceof TableError ? ` ${error.mend}` : '';
    faults.push({ pointer: '/footprint/value', detail: `${error.message}${mend}` });
    return { ...settings, footprint: { type: 'unknown' } };
  }
}
