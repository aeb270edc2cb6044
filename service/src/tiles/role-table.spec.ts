import { describe, expect, it } from 'vitest';
import { ColumnPackError, textAt, textColumn } from './column-pack.ts';
import { asRoleTable, bandsOf, limitRole, nameRole, numberRole } from './role-table.ts';

const columns = () => ({
  row: Uint32Array.of(1, 2),
  raDeg: Float64Array.of(10, 20),
  decDeg: Float64Array.of(-1, 1),
  'mag:g': Float64Array.of(18, NaN),
  'magError:g': Float64Array.of(0.1, NaN),
  'magLimit:g': Uint8Array.of(0, 1),
  'mag:r': Float64Array.of(17, 16),
  name: textColumn(['first', 'second']),
});

describe('a role table', () => {
  it('hands out its columns by role without copying', () => {
    const given = columns();
    const table = asRoleTable({ rows: 2, columns: given });
    expect(table.columns.raDeg).toBe(given.raDeg);
    expect(numberRole(table, 'mag:g')).toBe(given['mag:g']);
    expect(limitRole(table, 'magLimit:g')).toBe(given['magLimit:g']);
    expect(textAt(nameRole(table)!, 1)).toBe('second');
    expect(bandsOf(table)).toEqual(['g', 'r']);
  });
  it('has no values for a role the catalogue lacks', () => {
    expect(numberRole(asRoleTable({ rows: 2, columns: columns() }), 'czKms')).toBeUndefined();
  });
  it.each(['row', 'raDeg', 'decDeg'])('is refused without %s', (name) => {
    const { [name as 'row']: _, ...rest } = columns();
    expect(() => asRoleTable({ rows: 2, columns: rest })).toThrow(`needs a column "${name}"`);
  });
  it('is refused when a role has the wrong array type', () => {
    expect(() => asRoleTable({ rows: 2, columns: { ...columns(), czKms: Float32Array.of(1, 2) } })).toThrow(
      ColumnPackError,
    );
  });
});
