import { describe, expect, it } from 'vitest';
import { bindSource, type NumberedSource } from './bind-source.ts';

const source = { name: 'H 12', raDeg: 150, decDeg: 0, velocityKms: 2300 };
/** A row so many arcsec north of the source. */
const row = (number: number, name: string, northArcsec: number, velocityKms: number | null = 2301): NumberedSource => ({
  row: number,
  name,
  raDeg: 150,
  decDeg: northArcsec / 3600,
  velocityKms,
});
const bind = (rows: NumberedSource[], others: string[] = []) =>
  bindSource(source, rows, 30, (name) => others.includes(name));

describe('a source in the next version of its table', () => {
  it('is the row of the same name within the tolerance, though another is nearer', () => {
    expect(bind([row(1, 'H 13', 2), row(7, 'H 12', 8)]).row).toBe(7);
  });

  it('is the only row there where it was renamed, or has no name', () => {
    expect(bind([row(4, 'HX 0012', 5)]).row).toBe(4);
    expect(bind([row(4, '', 5)]).row).toBe(4);
  });

  it('is asked where the only row there bears the name of another source', () => {
    expect(bind([row(4, 'H 13', 5)], ['H 13'])).toMatchObject({ row: null, candidates: [{ row: 4 }] });
  });

  it('is asked where the name moved away, where two bear it, and where two stand there', () => {
    expect(bind([row(9, 'H 12', 300)]).row).toBeNull();
    expect(bind([row(9, 'H 12', 300), row(2, 'HX', 3)]).row).toBeNull();
    expect(bind([row(1, 'H 12', 3), row(2, 'H 12', 6)]).row).toBeNull();
    expect(bind([row(1, 'a', 3), row(2, 'b', 6)]).candidates.map((c) => c.row)).toEqual([1, 2]);
    expect(bind([])).toEqual({ row: null, candidates: [] });
  });

  it('is not another line at the same place', () => {
    expect(bind([row(1, 'H 12', 1, 2500), row(2, 'HX', 4)]).row).toBe(2);
    expect(bind([row(1, 'H 12', 1, null)]).row).toBe(1);
  });
});
