import type { EvidenceLine } from '@eremite/service/edition/columns/evidence-columns.ts';
import type { VerdictLine } from '@eremite/service/edition/columns/verdict-columns.ts';
import type { Candidate } from '@eremite/shared/contracts/verdict';

const NAMES = ['Ærø 1', 'source', '=sum(A1)', '+plus', 'a "quoted", b', 'Łódź', '-12.5', "o'clock & co", 'x|y', '@at'];

/** A verdict with everything that makes a table hard to write: gaps, accents, signs, limits, wide ranges. */
export function verdictLine(i: number, random: () => number): VerdictLine {
  const maybe = <T>(value: T): T | null => (random() < 0.2 ? null : value);
  const number = (from: number, to: number) => from + (to - from) * random();
  const distance = maybe(10 ** number(0.5, 2.3));
  const gasToLight = maybe(10 ** number(-1, 5));
  return {
    rank: i + 1,
    priority: random(),
    reason: i % 7 === 0 ? '' : `reason ${NAMES[i % NAMES.length]!}`,
    nullResult: i % 3 === 0 ? '' : 'nothing',
    item: {
      detectionId: `id-${i}`,
      name: `${NAMES[i % NAMES.length]!} ${i}`,
      raDeg: number(0, 360),
      decDeg: number(-90, 90),
      velocityKms: maybe(number(-400, 20000)),
      width50Kms: maybe(number(10, 500)),
      fluxJyKms: maybe(number(0.01, 300)),
      signalToNoise: maybe(number(4, 900)),
      distanceMpc: distance,
      distanceErrorMpc: distance === null ? null : maybe(distance * number(0.01, 0.4)),
      logHiMass: maybe(number(6, 11)),
      starlight: 'dark',
      pNone: random(),
      pMissed: random(),
      pSpurious: random(),
      power: maybe(random()),
      counterpart: maybe({
        catalogueId: 'c',
        rowId: 1,
        name: `obj ${i}`,
        probability: random(),
        separationArcsec: number(0, 90),
      }),
      surroundings: 'alone',
      pAlone: maybe(random()),
      nearest: maybe({
        catalogueId: 'c',
        rowId: 2,
        name: `gal ${i}`,
        separationKpc: number(1, 3000),
        velocityDifferenceKms: number(-500, 500),
      }),
      count1Mpc500Kms: maybe(Math.floor(number(0, 40))),
      gasToLight,
      gasToLightIsLimit: random() < 0.5,
      doubts: random() < 0.5 ? [] : [{ name: 'distance', grade: 'watch' }],
      grounds: [],
      headline: 'no starlight found',
      robustness: maybe({
        draws: 2000,
        seed: 1,
        starlightStability: random(),
        starlightInterval: null,
        surroundingsStability: random(),
        surroundingsInterval: null,
        flips: [],
      }),
      settled: null,
      reviews: 0,
      overrides: 0,
    },
  };
}

/** Candidates by arithmetic alone, so that any number of them needs no memory. */
export function candidateLine(i: number): EvidenceLine<Omit<Candidate, 'override'>> {
  const turn = (step: number) => (i * step) % 1;
  const gap = <T>(every: number, value: T): T | null => (i % every === 0 ? null : value);
  return {
    detection: `HI ${Math.floor(i / 7)}`,
    entry: {
      catalogueId: 'c',
      catalogueName: `table ${i % 4}`,
      kind: 'optical',
      rowId: i + 1,
      name: `row ${i}`,
      raDeg: 360 * turn(0.618034),
      decDeg: 180 * turn(0.414214) - 90,
      separationArcsec: 200 * turn(0.7548777),
      positionAngleDeg: 360 * turn(0.5698403),
      separationKpc: gap(11, 300 * turn(0.7548777)),
      velocityKms: gap(2, 20000 * turn(0.3247)),
      velocityDifferenceKms: gap(2, 1000 * turn(0.3247) - 500),
      band: gap(5, 'r'),
      magnitude: gap(5, 14 + 12 * turn(0.2207)),
      chanceProbability: gap(13, 10 ** (-8 * turn(0.8191))),
      likelihoodRatio: gap(13, 10 ** (20 * turn(0.671) - 12)),
      probability: turn(0.5497),
      object: i % 9,
      isStar: i % 10 === 0,
    },
  };
}
