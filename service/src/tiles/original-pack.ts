import { type Column, ColumnPackError, type PackedColumns } from './column-pack.ts';
import { packTight, unpackTight } from './tight-pack.ts';

const MAGIC = 0x4f505245; // 'ERPO' read little-endian
const HEAD_BYTES = 8;

/** Which original columns are kept as a role: name of the original -> name of the role. */
export type SameColumns = ReadonlyMap<string, string>;

const bytesOf = (array: ArrayBufferView): Uint8Array =>
  new Uint8Array(array.buffer, array.byteOffset, array.byteLength);
const equalBytes = (a: ArrayBufferView, b: ArrayBufferView): boolean =>
  a.byteLength === b.byteLength && Buffer.compare(bytesOf(a), bytesOf(b)) === 0;

function equal(a: Column, b: Column): boolean {
  if (a === b) return true;
  if ('kind' in a) return 'kind' in b && equalBytes(a.offsets, b.offsets) && equalBytes(a.bytes, b.bytes);
  return !('kind' in b) && a.constructor === b.constructor && equalBytes(a, b);
}

/**
 * Original columns that became a role without any change, bit for bit, in every piece of a table. Mostly half of them:
 * positions in degrees, magnitudes, names.
 */
export function sameColumns(pieces: readonly { roles: PackedColumns; originals: PackedColumns }[]): SameColumns {
  const same = new Map<string, string>();
  const first = pieces[0];
  if (!first) return same;
  for (const [name, original] of Object.entries(first.originals.columns)) {
    for (const [role, column] of Object.entries(first.roles.columns)) {
      const everywhere = () =>
        pieces.every(({ roles, originals }) => equal(originals.columns[name]!, roles.columns[role]!));
      if (equal(original, column) && everywhere()) {
        same.set(name, role);
        break;
      }
    }
  }
  return same;
}

/**
 * Packs the original cells of a tile, without those that its packed roles hold as well.
 *
 * @param columns the originals that are not kept as a role
 * @param order names of all originals, in the order of the file
 */
export function packOriginals(
  { rows, columns }: PackedColumns,
  order: readonly string[],
  same: SameColumns,
): Uint8Array {
  const packed = packTight({ rows, columns });
  if (same.size === 0) return packed;
  const head = Buffer.from(JSON.stringify(order.map((name) => (same.has(name) ? [name, same.get(name)] : [name]))));
  const start = Math.ceil((HEAD_BYTES + head.length) / 8) * 8;
  const blob = new Uint8Array(start + packed.length);
  blob.set(packed, start);
  const view = new DataView(blob.buffer);
  view.setUint32(0, MAGIC, true);
  view.setUint32(4, head.length, true);
  blob.set(head, HEAD_BYTES);
  return blob;
}

/**
 * All original columns of a tile in the order of the file, as views.
 *
 * @param roles the tile's unpacked roles
 * @throws {ColumnPackError} if the blob is damaged or does not belong to these roles
 */
export function unpackOriginals(bytes: Uint8Array, roles: PackedColumns): PackedColumns {
  const blob = bytes.byteOffset % 8 === 0 ? bytes : Uint8Array.from(bytes);
  const view = new DataView(blob.buffer, blob.byteOffset, blob.byteLength);
  if (blob.length < HEAD_BYTES || view.getUint32(0, true) !== MAGIC) return unpackTight(blob);
  const end = HEAD_BYTES + view.getUint32(4, true);
  const order = readOrder(blob, end);
  const { rows, columns } = unpackTight(blob.subarray(Math.ceil(end / 8) * 8));
  if (rows !== roles.rows) {
    throw new ColumnPackError(`the originals of a tile have ${rows} rows, its roles ${roles.rows}`);
  }
  const all = order.map(([name, role]): [string, Column] => {
    const column = role === undefined ? columns[name] : roles.columns[role];
    if (!column) throw new ColumnPackError(`the originals of a tile lack the column "${role ?? name}"`);
    return [name, column];
  });
  return { rows, columns: Object.fromEntries(all) };
}

function readOrder(blob: Uint8Array, end: number): [name: string, role?: string][] {
  try {
    return JSON.parse(Buffer.from(blob.subarray(HEAD_BYTES, end)).toString()) as [string, string?][];
  } catch {
    throw new ColumnPackError('the list of original columns is damaged');
  }
}
