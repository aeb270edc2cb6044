import { DomainError } from '../domain-error.ts';
import { FINEST_ORDER } from './healpix.ts';

/** Cells of one order as the text of a MOC lists them: inclusive ranges [first, last] of nested indices. */
export interface ListedOrder {
  readonly order: number;
  readonly ranges: readonly (readonly [first: bigint, last: bigint])[];
}

function toOrder(text: string): number {
  const order = Number(text);
  if (!/^\d{1,2}$/.test(text) || order > FINEST_ORDER) {
    throw new DomainError(`MOC: orders run from 0 to ${FINEST_ORDER}, found "${text}"`);
  }
  return order;
}

function toListedCell(text: string, order: number): bigint {
  if (!/^\d+$/.test(text)) throw new DomainError(`MOC: expected a cell number at order ${order}, found "${text}"`);
  const cell = BigInt(text);
  if (cell >= 12n << BigInt(2 * order)) {
    throw new DomainError(`MOC: order ${order} has cells 0 to ${(12n << BigInt(2 * order)) - 1n}, found ${text}`);
  }
  return cell;
}

/**
 * Reads the ASCII form of a space MOC, as in `1/1 2 4 2/12-14 21 23 25 8/`.
 *
 * @param text cells separated by blanks, line ends or commas; a leading `s` is allowed; an order without cells is kept
 * @throws {DomainError} that names the faulty piece
 *
 * Source: IVOA MOC 2.0, ASCII serialisation.
 */
export function readMocAscii(text: string): ListedOrder[] {
  // Blanks around the slash and the hyphen are not in the standard but occur; they cannot mean anything else.
  const pieces = text
    .trim()
    .replace(/^s\s*(?=\d)/i, '')
    .replace(/\s*([/-])/g, '$1')
    .replace(/-\s+/g, '-')
    .split(/[\s,]+/)
    .filter((piece) => piece !== '');
  if (pieces.length === 0) throw new DomainError('MOC: the text is empty; an empty region is written "0/"');
  const listed: { order: number; ranges: [bigint, bigint][] }[] = [];
  for (const piece of pieces) {
    const slash = piece.indexOf('/');
    if (slash >= 0) listed.push({ order: toOrder(piece.slice(0, slash)), ranges: [] });
    const current = listed.at(-1);
    if (!current) throw new DomainError(`MOC: the text must begin with an order as in "8/", found "${piece}"`);
    const cells = piece.slice(slash + 1);
    if (cells === '') continue;
    const [first = '', last = first, ...more] = cells.split('-');
    if (more.length > 0) throw new DomainError(`MOC: expected a cell or a range as in "12-14", found "${piece}"`);
    const range: [bigint, bigint] = [toListedCell(first, current.order), toListedCell(last, current.order)];
    if (range[1] < range[0]) throw new DomainError(`MOC: the range "${cells}" runs backwards`);
    current.ranges.push(range);
  }
  return listed;
}

/**
 * Reads the JSON form of a space MOC, as in `{"1":[1,2,4],"8":[]}` or the same under `"s"`.
 *
 * @throws {DomainError} that names the faulty piece
 *
 * Source: IVOA MOC 2.0, JSON serialisation. Cell numbers beyond 2^53 (orders 25 to 29) may be written as strings.
 */
export function readMocJson(text: string): ListedOrder[] {
  let value: unknown;
  try {
    // Long cell numbers would lose digits as doubles, so they are quoted before parsing.
    value = JSON.parse(text.replace(/(?<![\d."])(\d{16,})(?![\d."])/g, '"$1"'));
  } catch {
    throw new DomainError('MOC: not valid JSON; expected the like of {"1":[1,2,4],"8":[]}');
  }
  const plain = (v: unknown): v is Record<string, unknown> => typeof v === 'object' && v !== null && !Array.isArray(v);
  if (plain(value) && 's' in value) value = value['s'];
  if (!plain(value)) throw new DomainError('MOC: expected a JSON object of orders, the like of {"1":[1,2,4],"8":[]}');
  return Object.entries(value).map(([key, cells]) => {
    const order = toOrder(key);
    if (!Array.isArray(cells)) throw new DomainError(`MOC: order ${key} must hold a list of cells`);
    return {
      order,
      ranges: cells.map((cell): [bigint, bigint] => {
        const index = toListedCell(String(cell), order);
        return [index, index];
      }),
    };
  });
}

/**
 * Writes the ASCII form of a space MOC.
 *
 * @param byOrder cells of each order, ascending
 * @returns text such as `1/1 2 4 2/12-14 21 23 25 8/`; two successive cells are written apart, as the standard does
 */
export function writeMocAscii(byOrder: readonly (readonly [order: number, cells: readonly number[]])[]): string {
  return byOrder.map(([order, cells]) => `${order}/${asRuns(cells).join(' ')}`).join(' ');
}

function asRuns(cells: readonly number[]): string[] {
  const runs: string[] = [];
  for (let i = 0; i < cells.length;) {
    let last = i;
    while (last + 1 < cells.length && cells[last + 1] === cells[last]! + 1) last++;
    if (last - i >= 2) runs.push(`${cells[i]}-${cells[last]}`);
    else runs.push(...cells.slice(i, last + 1).map(String));
    i = last + 1;
  }
  return runs;
}
