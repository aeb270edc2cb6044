import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readFitsImage } from '@eremite/service/images/read-fits-image.ts';
import { fileSource } from '@eremite/service/tables/bytes/byte-source.ts';
import { DEFAULT_LIMITS } from '@eremite/service/tables/table.ts';
import { DEGREE } from '@eremite/shared/science/constants';
import { separation } from '@eremite/shared/science/sky/separation';
import { afterAll, describe, expect, it } from 'vitest';

const PYTHON = '/usr/bin/python3';
const hasAstropy = spawnSync(PYTHON, ['-c', 'import astropy.wcs']).status === 0;
if (!hasAstropy) console.warn(`images are not compared: ${PYTHON} has no astropy`);

interface Case {
  name: string;
  pixels: [number, number][];
  /** First and second celestial axis of the file, degrees. */
  sky: [number, number][];
  values: (number | null)[] | null;
}

const folder = mkdtempSync(join(tmpdir(), 'eremite-images-'));
const { cases, refused }: { cases: Case[]; refused: Record<string, string> } = hasAstropy
  ? (JSON.parse(
      execFileSync(PYTHON, [join(import.meta.dirname, 'astropy-images.py'), folder], {
        encoding: 'utf8',
        maxBuffer: 2 ** 26,
      }),
    ) as { cases: Case[]; refused: Record<string, string> })
  : { cases: [], refused: {} };
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const LIMITS = { ...DEFAULT_LIMITS, maxPixels: 1e7 };

/** Pixels that both ways may differ from astropy's. */
const MOST_PX = 0.01;

describe.skipIf(!hasAstropy)('images written by astropy', () => {
  it('are more than seventy, in every projection offered', () => {
    expect(cases.length).toBeGreaterThan(70);
    expect(cases.every(({ pixels }) => pixels.length > 0)).toBe(true);
  });

  it.each(cases.map((found) => [found.name, found] as const))('%s lies where astropy has it', async (name, given) => {
    const { wcs, facts } = await readFitsImage(await fileSource(join(folder, name)), LIMITS);
    // A digitised plate has a solution of its own beside the plain projection, which is what is read, and said.
    const mostPx = facts.notes.some((note) => note.includes('plate solution')) ? 0.5 : MOST_PX;
    expect(mostPx === MOST_PX).toBe(!name.startsWith('dss'));
    const isSwapped = name.startsWith('swapped');
    const [middle, next] = [wcs.toSky(20, 12)!, wcs.toSky(21, 12)!];
    const pixel = separation(middle.lon, middle.lat, next.lon, next.lat);
    expect(facts.width * facts.height).toBeGreaterThan(0);
    for (const [i, [x, y]] of given.pixels.entries()) {
      const [first, second] = given.sky[i]!;
      const [lon, lat] = (isSwapped ? [second, first] : [first, second]).map((deg) => deg * DEGREE) as [number, number];
      const there = wcs.toSky(x, y)!;
      expect(separation(there.lon, there.lat, lon, lat) / pixel).toBeLessThan(mostPx);
      const back = wcs.toPixel(lon, lat)!;
      expect(Math.hypot(back.x - x, back.y - y)).toBeLessThan(mostPx);
    }
  });

  it.each(cases.filter(({ values }) => values).map((found) => [found.name, found] as const))(
    '%s has the pixels astropy reads',
    async (name, { values }) => {
      const image = await readFitsImage(await fileSource(join(folder, name)), LIMITS);
      // Scaled integers are multiplied in single precision there and in double precision here.
      const isScaled = name === 'scale.fits';
      const close = (a: number, b: number) => a === b || (isScaled && Math.abs(a / b - 1) < 2e-7);
      const differing = [...image.values].filter((value, i) =>
        Number.isNaN(value) ? values![i] !== null : values![i] === null || !close(value, values![i]!),
      );
      expect(image.values.length).toBe(values!.length);
      expect(differing).toEqual([]);
    },
  );

  it.each(Object.entries(refused))('%s is refused for its %s', async (name, why) => {
    await expect(readFitsImage(await fileSource(join(folder, name)), LIMITS)).rejects.toThrow(why);
  });
});
