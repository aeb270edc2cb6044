import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { textAt, type TextColumn } from '../tiles/column-pack.ts';
import { readCatalogue } from './read-table.ts';
import { SettingsError } from './resolved.ts';

const read = (text: string, settings: IntakeSettings = {}) =>
  readCatalogue(memorySource(Buffer.from(text)), { kind: 'optical', ...settings });
const column = (reading: Awaited<ReturnType<typeof read>>, name: string) =>
  Array.from(reading.roles.columns[name] as Float64Array);
const faultsOf = async (promise: Promise<unknown>) => {
  const error = await promise.then(
    () => undefined,
    (e: unknown) => e,
  );
  expect(error).toBeInstanceOf(SettingsError);
  return (error as SettingsError).faults;
};
const levelAt = (reading: Awaited<ReturnType<typeof read>>, pointer: string) =>
  reading.questions.filter((question) => question.pointer === pointer).map(({ level }) => level);

describe('reading a catalogue', () => {
  it('puts aside only the rows without a usable position, each with line, column, value and reason', async () => {
    const rows = [
      'a,10,20,18',
      'b,400,20,18',
      'c,10,95,18',
      'd,,20,18',
      'e,10,x,18',
      'f,-10,-0.5,99.99',
      'g,359,1,bad',
    ];
    const reading = await read(`id,ra_deg,dec_deg,rmag\n${rows.join('\n')}\n`);
    expect(reading.sidelined.map(({ row, line, column: name, value }) => [row, line, name, value])).toEqual([
      [2, 3, 'ra_deg', '400'],
      [3, 4, 'dec_deg', '95'],
      [4, 5, 'ra_deg', ''],
      [5, 6, 'dec_deg', 'x'],
    ]);
    expect(reading.sidelined[0]!.reason).toMatch(/0 to 360/);
    expect(reading.sidelined[1]!.reason).toMatch(/-90 to \+90/);
    expect(Array.from(reading.roles.columns.row)).toEqual([1, 6, 7]);
    expect(column(reading, 'raDeg')).toEqual([10, 350, 359]);
    expect(column(reading, 'mag:r')).toEqual([18, NaN, NaN]);
    expect(reading.check).toMatchObject({ rows: 7, usable: 3, sidelined: 4, leftOut: 0 });
    expect(reading.questions.map(({ text }) => text).join('\n')).toMatch(/"rmag" .*"bad" in row 7 \(line 8\)/);
  });

  it('keeps the sign of a declination of minus zero degrees, in text and in split columns', async () => {
    const whole = await read('id,ra,dec\na,00:00:00,-00:00:01.0\nb,01 39 30,-00 30 00\n');
    // Source: IAU notation; arithmetic (-1/3600 and -0.5 degrees).
    expect(column(whole, 'decDeg')[0]).toBeCloseTo(-0.0002777777777777778, 12);
    expect(column(whole, 'decDeg')[1]).toBeCloseTo(-0.5, 12);
    expect(column(whole, 'raDeg')[1]).toBeCloseTo(24.875, 10);
    const split = await read('id,RAh,RAm,RAs,DE-,DEd,DEm,DEs\na,1,39,30,-,00,00,01\nb,1,39,30,+,43,28,30\n');
    expect(column(split, 'decDeg')[0]).toBeCloseTo(-0.0002777777777777778, 12);
    expect(column(split, 'raDeg')).toEqual([24.875, 24.875]);
    const unsplit = await read('id,RAh,RAm,DEd,DEm\na,1,39.5,-00,30\nb,2,0,+10,0\n');
    expect(column(unsplit, 'decDeg')).toEqual([-0.5, 10]);
  });

  it('asks whether right ascensions are hours when all of many lie below 24 and no unit is stated', async () => {
    const rows = Array.from({ length: 30 }, (_, i) => `${i},${i / 2},5`).join('\n');
    expect(levelAt(await read(`id,ra,dec\n${rows}\n`), '/units/ra')).toEqual(['ask']);
    expect((await read(`id,ra,dec\n${rows}\n`)).check.ready).toBe(false);
    expect(levelAt(await read(`id,ra_deg,dec_deg\n${rows}\n`), '/units/ra')).toEqual([]);
    const hours = await read(`id,ra,dec\n${rows}\n`, { units: { ra: 'h' } });
    expect(levelAt(hours, '/units/ra')).toEqual([]);
    expect(column(hours, 'raDeg')[3]).toBe(22.5);
    expect(hours.check.ready).toBe(true);
  });

  it('turns velocities of any convention and frame into optical barycentric cz', async () => {
    const table = (header: string, value: string) => `id,ra_deg,dec_deg,${header}\nJ0139+43,24.875,43.475,${value}\n`;
    const cz = async (text: string, settings: IntakeSettings = {}) =>
      column(await read(text, { kind: 'hi', ...settings }), 'czKms')[0];
    // Source: check values of Greisen et al. (2006) relations and of the LSRK, Local Group and CMB frames at this place.
    expect(await cz(table('vel', '2444.307'), { velocity: { convention: 'radio' } })).toBeCloseTo(2464.4, 2);
    expect(await cz(table('vel', '2454.271'), { velocity: { convention: 'relativistic' } })).toBeCloseTo(2464.4, 2);
    expect(await cz(table('vlsr', '2466.1862'))).toBeCloseTo(2464.4, 2);
    expect(await cz(table('vel', '2703.3456'), { velocity: { frame: 'local-group' } })).toBeCloseTo(2464.4, 3);
    expect(await cz(table('vel', '2218.6889'), { velocity: { frame: 'cmb' } })).toBeCloseTo(2464.4, 3);
    expect(await cz(table('cz_ms', '2464400'))).toBeCloseTo(2464.4, 8);
    expect(await cz(table('redshift', '0.01'))).toBeCloseTo(2997.92458, 6);
    expect(await cz(table('cz', '-9999'))).toBeNaN();
    expect(await cz(table('cz', '-230'))).toBe(-230);
  });

  it('reads 99 as a width and 99.99 as no magnitude', async () => {
    const reading = await read('id,ra,dec,w50,gmag\na,40,1,99,99.99\nb,41,1,55,18.2\n', {
      kind: 'hi',
      columns: { magnitudes: [{ column: 'gmag', band: 'g' }] },
    });
    expect(column(reading, 'width50Kms')).toEqual([99, 55]);
    expect(column(reading, 'mag:g')).toEqual([NaN, 18.2]);
  });

  it('keeps limits as limits, from a flag column and from the cell itself', async () => {
    const reading = await read('id,ra,dec,l_rmag,rmag,gmag\na,40,1,>,22.5,>23.1\nb,41,1,,18.2,19\n');
    expect(column(reading, 'mag:r')).toEqual([22.5, 18.2]);
    expect(Array.from(reading.roles.columns['magLimit:r'] as Uint8Array)).toEqual([1, 0]);
    expect(column(reading, 'mag:g')).toEqual([23.1, 19]);
    expect(Array.from(reading.roles.columns['magLimit:g'] as Uint8Array)).toEqual([1, 0]);
  });

  it('converts units, error meanings, moduli and fluxes', async () => {
    const text = 'id,ra,dec,cz,err,dm,e_dm,sint\na,40,1,3000,2.145966,30,0.1,150000\n';
    const reading = await read(text, {
      kind: 'hi',
      columns: { positionError: 'err', distance: 'dm', distanceError: 'e_dm', flux: 'sint' },
      units: { positionError: 'arcmin', distance: 'mag', flux: 'Jy Hz' },
      errorMeaning: 'radial90',
    });
    // Source: Rayleigh, r90 = 2.145966 sigma.
    expect(column(reading, 'positionErrorArcsec')[0]).toBeCloseTo(60, 4);
    expect(column(reading, 'distanceMpc')[0]).toBeCloseTo(10, 10);
    expect(column(reading, 'distanceErrorMpc')[0]).toBeCloseTo((10 * 0.1 * Math.LN10) / 5, 10);
    // Source: 49.7 D^2 S[Jy Hz] = 2.356e5 D^2 S[Jy km/s] / (1+z)^2, to the accuracy of these constants.
    expect(column(reading, 'fluxJyKms')[0]! / ((150000 * 49.7 * (1 + 3000 / 299792.458) ** 2) / 2.356e5)).toBeCloseTo(
      1,
      2,
    );
  });

  it('names a column that is not there, one given twice and a unit that cannot be, with what is near', async () => {
    const text = 'id,ra_deg,dec_deg,cz_kms,dist\na,40,1,3000,20\n';
    const faults = await faultsOf(
      read(text, {
        columns: { ra: 'RA_degr', dec: 'dec_deg', velocity: 'cz_kms', redshift: 'cz_kms', distance: 'dist' },
        units: { distance: 'furlong' },
      }),
    );
    expect(faults.map(({ pointer }) => pointer)).toEqual(['/columns/ra', '/columns/redshift', '/units/distance']);
    expect(faults[0]!.detail).toMatch(/no column "RA_degr". Did you mean "ra_deg"/);
    expect(faults[1]!.detail).toMatch(/"cz_kms" is named twice: as velocity and as redshift/);
  });

  it('says which column is wanted when a table has no position', async () => {
    const faults = await faultsOf(read('name,colour\na,red\n'));
    expect(faults.map(({ pointer }) => pointer)).toEqual(['/columns/ra', '/columns/dec']);
    expect(faults[0]!.detail).toMatch(/name, colour/);
  });

  it('keeps only the rows wanted, and long identifiers whole', async () => {
    const text = 'objid,ra,dec,type\n1237648720693755918,40,1,G\n1237648720693755919,41,1,S\n';
    const reading = await read(text, { columns: { name: 'objid' }, keep: [{ column: 'type', values: ['G'] }] });
    expect(reading.check).toMatchObject({ rows: 2, usable: 1, leftOut: 1, sidelined: 0 });
    expect(textAt(reading.roles.columns['name'] as TextColumn, 0)).toBe('1237648720693755918');
  });

  it('states every default that it takes', async () => {
    const reading = await read('id,ra,dec,cz,Kmag\na,40,1,3000,12\n');
    const all = reading.assumed.join('\n');
    for (const word of [
      /ICRS/,
      /optical convention and the barycentric frame/,
      /Ks Vega/,
      /depth of Ks/,
      /0\.2 arcsec/,
    ]) {
      expect(all).toMatch(word);
    }
  });

  it('reads resolved settings again without anything left open', async () => {
    const text = 'id,ra,dec,cz,Kmag\na,40,1,3000,12\nb,41,1,3100,12.5\n';
    const first = await read(text);
    const again = await read(text, first.resolved);
    expect(again.resolved).toEqual(first.resolved);
    expect(again.questions.filter(({ level }) => level === 'ask')).toEqual([]);
  });

  it('keeps the rows before the place where a file breaks off, and says so', async () => {
    const cells = Array.from({ length: 300 }, (_, i) => `<TR><TD>${100 + i / 10}</TD><TD>5</TD></TR>`).join('\n');
    const head =
      '<VOTABLE version="1.4"><RESOURCE><TABLE><FIELD name="ra" datatype="double" unit="deg"/><FIELD name="dec" datatype="double" unit="deg"/><DATA><TABLEDATA>';
    const reading = await read(`${head}${cells}`.slice(0, -20));
    expect(reading.roles.rows).toBe(299);
    // Asked of a person; a plan, which asks nobody, takes the rows and says so.
    expect(levelAt(reading, '/acceptTruncated')).toEqual(['ask']);
    expect(reading.check.ready).toBe(false);
    expect(reading.assumed.join()).toMatch(/only in part.*299 rows before it are kept/);
    const accepted = await read(`${head}${cells}`.slice(0, -20), { acceptTruncated: true });
    expect(levelAt(accepted, '/acceptTruncated')).toEqual(['assumed']);
    expect(accepted.check.ready).toBe(true);
  });

  it('takes the area from dense rows, states it, and refuses for sparse ones', async () => {
    const rows: string[] = [];
    for (let i = 0; i < 80; i++) for (let j = 0; j < 80; j++) rows.push(`${150 + i / 20},${2 + j / 20}`);
    const dense = await read(`ra,dec\n${rows.join('\n')}\n`);
    expect(dense.coverage.type).toBe('rows');
    expect(dense.coverage.areaSqDeg! / 16).toBeGreaterThan(0.8);
    expect(dense.coverage.areaSqDeg! / 16).toBeLessThan(1.1);
    const sparse = await read('ra,dec\n10,10\n200,-40\n');
    expect(sparse.coverage).toMatchObject({ type: 'unknown', moc: null });
    expect(sparse.assumed.join()).toMatch(/area covered is not stated: it is unknown/);
    const stated = await read('ra,dec\n10,10\n', { footprint: { type: 'circles', value: [[10, 10, 1]] } });
    expect(stated.coverage.areaSqDeg).toBeCloseTo(Math.PI, 1);
    const faults = await faultsOf(read('ra,dec\n10,10\n', { footprint: { type: 'moc', value: '5/99999999' } }));
    expect(faults[0]!.pointer).toBe('/footprint/value');
  });

  it('asks about distances that are more likely kpc, and takes the unit it is told', async () => {
    const text = 'id,ra_deg,dec_deg,dist\na,40,1,4000\nb,41,1,2500\nc,41,2,500\n';
    const settings = { kind: 'hi' as const, columns: { distance: 'dist' } };
    expect(levelAt(await read(text, settings), '/units/distance')).toEqual(['ask']);
    const told = await read(text, { ...settings, units: { distance: 'kpc' } });
    expect(levelAt(told, '/units/distance')).toEqual([]);
    expect(told.roles.columns['distanceMpc']).toEqual(new Float64Array([4, 2.5, 0.5]));
    const near = await read(text.replace('4000', '40').replace('2500', '25'), settings);
    expect(levelAt(near, '/units/distance')).toEqual(['assumed']);
  });

  it('asks about velocities that must be m/s and does not use a distance without a unit', async () => {
    const reading = await read('id,ra_deg,dec_deg,cz,dist\na,40,1,2400000,20\nb,41,1,2500000,21\n', { kind: 'hi' });
    expect(levelAt(reading, '/units/velocity')).toEqual(['ask']);
    expect(levelAt(reading, '/columns/distance')).toEqual(['warning']);
    expect(reading.roles.columns['distanceMpc']).toBeUndefined();
    const told = await read('id,ra_deg,dec_deg,dist\na,40,1,20\n', { kind: 'hi', columns: { distance: 'dist' } });
    expect(column(told, 'distanceMpc')).toEqual([20]);
    expect(levelAt(told, '/units/distance')).toEqual(['assumed']);
  });

  it('asks about a filter that no row passes, and says what the column holds', async () => {
    const rows = 'id,ra_deg,dec_deg,type\na,10,5,G\nb,11,5,GPair\nc,12,5,*\n';
    const none = await read(rows, { keep: [{ column: 'type', values: ['g', 'Gal'] }] });
    const [question] = none.questions.filter(({ pointer }) => pointer === '/keep/0/values');
    expect(question).toEqual({
      level: 'ask',
      pointer: '/keep/0/values',
      text: 'No row has "g" or "Gal" in "type", so none would be kept. Other values there are "G", "GPair", "*".',
    });
    expect(none.check).toMatchObject({ usable: 0, leftOut: 3, ready: false });
    expect(none.assumed.join()).toContain('No row has "g"');
    const some = await read(rows, { keep: [{ column: 'type', values: ['G', 'Gal'] }] });
    expect(levelAt(some, '/keep/0/values')).toEqual(['warning']);
    expect(some.check).toMatchObject({ usable: 1, ready: true });
    expect(levelAt(await read(rows, { keep: [{ column: 'type', values: ['G', '*'] }] }), '/keep/0/values')).toEqual([]);
  });

  it('asks for the reddening column where a band is to be corrected by one', async () => {
    const bands = [{ name: 'r', extinction: 'column' as const }];
    const rows = 'id,ra_deg,dec_deg,rmag,ebv\na,10,5,18,0.03\n';
    expect(levelAt(await read(rows, { bands }), '/columns/reddening')).toEqual([]);
    const without = await read(rows, { bands, columns: { reddening: null } });
    expect(levelAt(without, '/columns/reddening')).toEqual(['ask']);
    expect(without.check.ready).toBe(false);
  });
});
