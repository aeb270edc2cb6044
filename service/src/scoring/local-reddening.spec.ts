import { describe, expect, it } from 'vitest';
import type { RoleTable } from '../tiles/role-table.ts';
import type { Detection } from './detection-table.ts';
import type { EngineCatalogue } from './engine-input.ts';
import { LocalReddening } from './local-reddening.ts';

const ARCMIN = 1 / 60;
const detection = (raDeg: number, decDeg: number, ebvMag = NaN) =>
  ({ raDeg, decDeg, ebvMag, ebvSource: '' }) as Detection;

function table(name: string, rows: readonly (readonly [raDeg: number, decDeg: number, ebvMag: number])[]) {
  const column = (k: 0 | 1 | 2) => Float64Array.from(rows, (row) => row[k]);
  const columns = { row: Uint32Array.from(rows, (_, i) => i + 1), raDeg: column(0), decDeg: column(1) };
  const roles = { rows: rows.length, columns: { ...columns, ebvMag: column(2) } } as unknown as RoleTable;
  return { name, roles } as EngineCatalogue;
}

const fill = (detections: Detection[], tables: EngineCatalogue[]) => new LocalReddening(tables).fill(detections);

describe('the reddening of a detection that gives none', () => {
  it('is the median of the rows within 10 arcmin, also across 0h', () => {
    const one = detection(0.01, 20);
    const near = [0.02, 0.03, 0.5].map((ebv, i) => [(359.95 + 0.05 * i) % 360, 20, ebv] as const);
    fill([one], [table('deep', [...near, [0.01, 20 + 11 * ARCMIN, 9]])]);
    expect(one).toMatchObject({ ebvMag: 0.03, ebvSource: 'deep' });
  });

  it('is not taken where the detection has its own, where none is near, or from missing values', () => {
    const own = detection(10, 0, 0.2);
    const far = detection(20, 0);
    fill([own, far], [table('deep', [[10, 0, 0.03], [20, 0, NaN], [20, 1, 0.1]])]); // prettier-ignore
    expect(own).toMatchObject({ ebvMag: 0.2, ebvSource: '' });
    expect(far).toMatchObject({ ebvMag: NaN, ebvSource: '' });
  });

  it('comes from the first table that has any there', () => {
    const one = detection(10, 0);
    fill([one], [table('elsewhere', [[50, 0, 1]]), table('second', [[10, 0, 0.04]]), table('third', [[10, 0, 0.08]])]); // prettier-ignore
    expect(one).toMatchObject({ ebvMag: 0.04, ebvSource: 'second' });
  });

  it('does not weigh a crowd of rows at one place above the rest', () => {
    const one = detection(10, 0);
    const crowd = Array.from({ length: 99 }, (_, i) => [10 + i * 1e-5, 0.001, 0.9] as const);
    fill([one], [table('deep', [...crowd, [10, 0.1, 0.02], [10, -0.1, 0.03]])]);
    expect(one.ebvMag).toBe(0.03);
  });
});
