import { fileSource } from '@eremite/service/tables/bytes/byte-source.ts';
import { openTable } from '@eremite/service/tables/open-table.ts';
import type { OpenTable } from '@eremite/service/tables/table.ts';
import { readAll, type ReadCell } from '@eremite/service/tables/testing/read-all.ts';

export type Cell = number | string | boolean | null | { array: Cell[] };

/** A table as astropy-tables.py tells it. */
export interface AstropyTable {
  file: string;
  table: number;
  error?: string;
  readMe?: string;
  rows: number;
  columns: { name: string; unit: string | null }[];
  nulls: number[] | null;
  first?: Cell[];
  last?: Cell[];
}

/** The file opened last: the tables of one file come one after the other, and some files hold hundreds. */
let last: { file: string; open: Promise<OpenTable> } | undefined;

function opened({ file, readMe }: AstropyTable): Promise<OpenTable> {
  if (last?.file !== file) {
    const open = async () =>
      openTable(await fileSource(file), {}, readMe === undefined ? {} : { readMe: await fileSource(readMe) });
    last = { file, open: open() };
  }
  return last.open;
}

/** Reads the same table here and tells every difference: rows, names, units, nulls in each column, first and last row. */
export async function compareWithAstropy(record: AstropyTable): Promise<string[]> {
  const differences: string[] = [];
  try {
    const open = await opened(record);
    const facts = open.tables[record.table];
    if (facts === undefined) return [`no table ${record.table}`];
    const { rows, broken, fault } = await readAll(open, record.table);
    if (fault !== undefined) differences.push(`ends in: ${fault.message}`);
    if (rows.length !== record.rows)
      differences.push(`${rows.length} rows (${broken.length} broken), not ${record.rows}`);
    const names = facts.columns.map(({ name }) => name.replace(/^column_/, 'col'));
    const theirs = record.columns.map(({ name }) => name);
    if (names.join('|') !== theirs.join('|')) differences.push(`columns ${names.join(',')} not ${theirs.join(',')}`);
    for (const [i, column] of facts.columns.entries()) {
      const unit = record.columns[i]?.unit ?? null;
      if (unitKey(column.unit ?? null) !== unitKey(unit))
        differences.push(`unit of ${column.name} ${column.unit} not ${unit}`);
      const nulls = rows.filter((row) => isNull(row[i]!)).length;
      if (record.nulls && nulls !== record.nulls[i])
        differences.push(`${nulls} nulls in ${column.name}, not ${record.nulls[i]}`);
      for (const [label, ours, their] of [
        ['first', rows[0], record.first],
        ['last', rows.at(-1), record.last],
      ] as const) {
        if (ours === undefined || their === undefined || same(ours[i]!, their[i] ?? null)) continue;
        differences.push(`${label} ${column.name} ${JSON.stringify(ours[i])} not ${JSON.stringify(their[i])}`);
      }
    }
  } catch (error) {
    differences.push(`not read: ${(error as Error).message}`);
  }
  return differences;
}

function isNull(cell: ReadCell): boolean {
  return cell === null || (typeof cell === 'string' && /^(\[?\s*((NaN|null)[\s,]*)*\]?)$/.test(cell.trim()));
}

function same(ours: ReadCell, theirs: Cell): boolean {
  if (theirs === null) return isNull(ours);
  if (typeof theirs === 'boolean')
    return String(ours).toLowerCase() === String(theirs) || Number(ours) === Number(theirs);
  if (typeof theirs === 'object') return sameArray(ours, theirs.array);
  if (typeof ours === 'number' || typeof theirs === 'number') {
    const number = typeof ours === 'number' ? ours : Number(String(ours).replace(/^\+?inf.*/i, 'Infinity'));
    // A 32-bit column written as decimal text keeps the decimals as they are written.
    return number === Number(theirs) || Math.fround(number) === theirs || String(ours).trim() === String(theirs);
  }
  return String(ours).trim() === theirs || sameNumberWord(String(ours), theirs);
}

/** Infinities are spelled in many ways. */
function sameNumberWord(ours: string, theirs: string): boolean {
  const sign = (text: string) => /^([+-]?)inf(inity)?$/i.exec(text.trim())?.[1]?.replace('+', '');
  return sign(ours) !== undefined && sign(ours) === sign(theirs);
}

function sameArray(ours: ReadCell, theirs: Cell[]): boolean {
  const text = String(ours ?? '');
  const items = text.startsWith('[')
    ? (JSON.parse(text) as Cell[]).flat(9).map(String)
    : text.split(/[\s,]+/).filter((item) => item !== '');
  const flat = theirs.flatMap(function flatten(cell): Cell[] {
    return cell !== null && typeof cell === 'object' ? cell.array.flatMap(flatten) : [cell];
  });
  if (items.length !== flat.length) return flat.every((cell) => cell === null) || items.join('') === flat.join('');
  return flat.every((cell, i) => {
    const item = items[i]!;
    if (cell === null || cell === 'None') return /^(nan|null|)$/i.test(item);
    if (typeof cell === 'boolean') return item.toLowerCase() === String(cell) || item === (cell ? '1' : '0');
    // 32-bit elements are written with the digits they need, not with those of a double.
    return item === String(cell) || Math.abs(Number(item) - Number(cell)) <= 1e-6 * Math.abs(Number(cell));
  });
}

const BODIES: Readonly<Record<string, string>> = { sun: 'sol', earth: 'earth', jup: 'jupiter' };
const QUANTITIES: Readonly<Record<string, string>> = { m: 'mass', r: 'rad', l: 'lum' };

/** One spelling for km/s, km.s-1, "km s**-1", [K] and the like: factors with their powers, in order. */
function unitKey(unit: string | null): string {
  if (unit === null || /^-*$/.test(unit.trim())) return '';
  const powers = new Map<string, number>();
  let sign = 1;
  const spelled = unit
    .toLowerCase()
    .replaceAll('pixel', 'pix')
    .replace(/\bangstroms?\b/g, 'aa')
    .replace(/\bsec\b/g, 's')
    .replace(/\be-(?=$|\s)/g, 'e')
    // Astronomical units by their two usual names: Msun and solMass, Rearth and earthRad.
    .replace(/\b([mrl])(sun|earth|jup)\b/g, (_, what: string, body: string) => BODIES[body]! + QUANTITIES[what]!)
    .replace(/^\[(.*)\]$/, 'dex $1')
    .replace(/^dex\((.*)\)$/, 'dex $1')
    .replace(/0\.1\s*(?=[np]m)/, 'tenth ')
    .replace(/\s*\/\s*/g, ' / ')
    .replace(/\*\*|\^/g, '');
  for (const part of spelled.split(/[\s.*]+/)) {
    if (part === '/') sign = -1;
    const [, name, power] = /^\(?([^\d()-]+)\(?([+-]?\d+)?\)*$/.exec(part) ?? [];
    if (part === '/' || name === undefined) continue;
    powers.set(name, (powers.get(name) ?? 0) + sign * Number(power ?? 1));
    sign = 1;
  }
  return [...powers]
    .map(([name, power]) => name + power)
    .sort()
    .join(' ');
}
