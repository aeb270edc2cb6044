import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { Random } from '../robustness/random.ts';
import { blend } from './blend.ts';
import { cloud } from './cloud.ts';
import { continuum } from './continuum.ts';
import { debris } from './debris.ts';
import { distanceDoubt } from './distance.ts';
import type { Doubt } from './doubt.ts';
import { edge } from './edge.ts';
import { extinctionDoubt } from './extinction.ts';
import { hydroxyl } from './hydroxyl.ts';
import { COMMON_INTERFERENCE, interference } from './interference.ts';
import { recombinationLine } from './recombination-line.ts';
import { sidelobe } from './sidelobe.ts';
import { spuriousLine } from './spurious-line.ts';

const random = new Random(412);
const ODD = [NaN, Infinity, -Infinity, 0, -0, -1, -99, 1e-9, 0.5, 1, 30, 400, 2500, 1e6, 1e300];
const odd = () => ODD[Math.floor(random.uniform() * ODD.length)]!;
const yes = () => random.uniform() < 0.5;
const kind = () => (['measured', 'flow', 'hubble', 'none'] as const)[Math.floor(4 * random.uniform())]!;

const doubts: Record<string, () => Doubt> = {
  spuriousLine: () => spuriousLine({ reliability: odd(), signalToNoise: odd() }),
  cloud: () =>
    cloud({
      galacticLonRad: odd(),
      galacticLatRad: odd(),
      lsrKms: odd(),
      localGroupKms: odd(),
      width50Kms: odd(),
    }),
  debris: () =>
    debris({
      neighbours: [0, 1].map((k) => ({
        name: `neighbour ${k}`,
        separationRad: odd(),
        distanceMpc: odd(),
        velocityDifferenceKms: odd(),
        logHiMass: odd(),
        logStellarMass: odd(),
        bridge: yes(),
      })),
      covered: yes(),
      hasVelocity: yes(),
    }),
  hydroxyl: () =>
    hydroxyl({
      redshift: odd(),
      sources: [{ name: 's', separationArcsec: odd(), w1MinusW2: odd(), redshift: odd(), redshiftError: odd() }],
      radiusArcsec: odd(),
      covered: yes(),
    }),
  recombinationLine: () =>
    recombinationLine({ czKms: odd(), width50Kms: odd(), galacticLatRad: odd(), continuumMjy: odd() }),
  interference: () =>
    interference({
      czKms: odd(),
      topocentric: yes(),
      width50Kms: odd(),
      channelKms: odd(),
      bands: yes() ? COMMON_INTERFERENCE : [{ name: 'b', lowMhz: odd(), highMhz: odd() }],
    }),
  blend: () => blend({ beamArcmin: odd(), distanceMpc: odd(), galaxiesAtVelocity: yes() ? 1 : 3 }),
  sidelobe: () =>
    sidelobe({
      sources: [
        { name: 's', separationArcmin: odd(), velocityDifferenceKms: odd(), fluxJyKms: odd(), width50Kms: odd() },
      ],
      beamArcmin: odd(),
      fluxJyKms: odd(),
      width50Kms: odd(),
    }),
  continuum: () => continuum({ strongestMjy: odd(), covered: yes() }),
  extinction: () => extinctionDoubt({ ebvMag: odd(), galacticLatRad: odd() }),
  edge: () => edge({ neighbourCovered: odd(), counterpartCovered: odd() }),
  distance: () =>
    distanceDoubt({
      kind: kind(),
      distanceMpc: odd(),
      errorMpc: odd(),
      localGroupKms: odd(),
      cautions: yes() ? [] : ['caution'],
    }),
};

describe('every doubt', () => {
  it.each(Object.keys(doubts))('%s shows no NaN and no infinity for odd input: it answers or refuses', (name) => {
    let answers = 0;
    for (let k = 0; k < 3000; k++) {
      try {
        const result = doubts[name]!();
        answers++;
        expect(result.sentence).not.toMatch(/NaN|Infinity|undefined/);
        expect(result.sentence).toMatch(/\.$/);
        expect(result.value === undefined || Number.isFinite(result.value)).toBe(true);
      } catch (error) {
        if (!(error instanceof DomainError)) throw error;
      }
    }
    expect(answers).toBeGreaterThan(100);
  });
});
