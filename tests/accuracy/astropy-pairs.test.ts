import { execFileSync, spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { buildZoneGrid } from '@eremite/service/matching/build-zone-grid.ts';
import { pairSearch } from '@eremite/service/matching/pair-search.ts';
import { evenSky, near, type SkyPoints } from '@eremite/service/matching/testing/brute-force.ts';

const PYTHON = '/usr/bin/python3';
const hasAstropy = spawnSync(PYTHON, ['-c', 'import astropy.coordinates, scipy']).status === 0;
if (!hasAstropy) console.warn(`pairs are not compared with astropy: ${PYTHON} has no astropy and scipy`);

/** Reads positions and rows as JSON, gives the pairs within the radius and their separations. */
const SCRIPT = `
import json, sys
import astropy.units as u
from astropy.coordinates import SkyCoord, search_around_sky
given = json.load(sys.stdin)
at, rows = (SkyCoord(given[k][0], given[k][1], unit='deg') for k in ('at', 'rows'))
i, j, apart, _ = search_around_sky(at, rows, given['radius'] * u.arcsec)
json.dump([i.tolist(), j.tolist(), apart.arcsec.tolist()], sys.stdout)
`;

function astropyPairs(at: SkyPoints, rows: SkyPoints, radius: number): Map<string, number> {
  const input = JSON.stringify({
    at: [[...at.raDeg], [...at.decDeg]],
    rows: [[...rows.raDeg], [...rows.decDeg]],
    radius,
  });
  const output = execFileSync(PYTHON, ['-c', SCRIPT], { input, maxBuffer: 2 ** 28, encoding: 'utf8' });
  const [position, row, apart] = JSON.parse(output) as [number[], number[], number[]];
  return new Map(position.map((p, i) => [`${p} ${row[i]!}`, apart[i]!]));
}

function ourPairs(at: SkyPoints, rows: SkyPoints, radius: number): Map<string, number> {
  const radiusArcsec = new Float64Array(at.raDeg.length).fill(radius);
  const { position, row, separationArcsec } = pairSearch(buildZoneGrid(rows.raDeg, rows.decDeg), {
    ...at,
    radiusArcsec,
  });
  return new Map(Array.from(position, (p, i) => [`${p} ${row[i]!}`, separationArcsec[i]!]));
}

const repeat = (ra: number, dec: number, count: number): SkyPoints => ({
  raDeg: new Float64Array(count).fill(ra),
  decDeg: new Float64Array(count).fill(dec),
});
const join = (...parts: SkyPoints[]): SkyPoints => ({
  raDeg: Float64Array.from(parts.flatMap(({ raDeg }) => [...raDeg])),
  decDeg: Float64Array.from(parts.flatMap(({ decDeg }) => [...decDeg])),
});
/** Rows north of each position at a separation one part in 1e8 inside or outside 90 arcsec, in turn. */
const beside = ({ raDeg, decDeg }: SkyPoints): SkyPoints => ({
  raDeg,
  decDeg: decDeg.map((dec, i) => dec + ((dec > 0 ? -1 : 1) * 90 * (1 + (i % 2 ? 1e-8 : -1e-8))) / 3600),
});

const MAS = 1 / 3.6e6;
const at = evenSky(3000, 71);
const CASES: [name: string, at: SkyPoints, rows: SkyPoints, radius: number, atLeast: number][] = [
  ['all-sky at 90 arcsec', at, join(evenSky(60_000, 72), near(at, 0.03, 73)), 90, 500],
  ['all-sky at 10 degrees', evenSky(200, 74), evenSky(5000, 75), 36_000, 5000],
  ['at 120 degrees', evenSky(30, 76), evenSky(500, 77), 432_000, 5000],
  ['round the north pole', evenSky(500, 78, 89, 90), evenSky(20_000, 79, 88.9, 90), 90, 500],
  ['round the south pole', evenSky(500, 80, -90, -89), evenSky(20_000, 81, -90, -88.9), 90, 500],
  ['across right ascension 0', near(repeat(0, 10, 500), 0.3, 82), near(repeat(0, 10, 5000), 0.3, 83), 90, 500],
  [
    'with duplicates',
    repeat(33, -12, 200),
    join(repeat(33, -12, 300), near(repeat(33, -12, 300), 0.01, 84)),
    10,
    60_000,
  ],
  ['of milliarcseconds', near(repeat(210, 54, 200), 5 * MAS, 85), near(repeat(210, 54, 200), 5 * MAS, 86), 0.004, 5000],
  ['one part in 1e8 about the radius', at, beside(at), 90, 1500],
];

describe.skipIf(!hasAstropy)('pairs are those of astropy search_around_sky', () => {
  it.each(CASES)('%s', (_, positions, rows, radius, atLeast) => {
    const ours = ourPairs(positions, rows, radius);
    const theirs = astropyPairs(positions, rows, radius);
    expect(theirs.size).toBeGreaterThanOrEqual(atLeast);
    expect([...ours.keys()].sort()).toEqual([...theirs.keys()].sort());
    // Both round to about 1e-15 of a radian at any separation; near 120 degrees a last bit is 6e-11 arcsec.
    const worst = Math.max(...Array.from(theirs, ([pair, apart]) => Math.abs(apart - ours.get(pair)!)));
    expect(worst).toBeLessThan(2e-9);
  });
});
