import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { luminosityDistance } from './cosmology.ts';
import { chooseDistance, type Distance, type DistanceInput, type DistanceRule } from './distance-rule.ts';

const COSMOLOGY = { h0: 70, omegaM: 0.3 };
const HUBBLE: DistanceRule = {
  flowModel: 'none',
  hubbleFrame: 'km96',
  minimumVelocityKms: 500,
  warnVelocityKms: 1500,
  peculiarVelocityKms: 200,
  clusterPeculiarVelocityKms: 500,
};
const FLOW: DistanceRule = { ...HUBBLE, flowModel: 'mould2000' };
const place = (raDeg: number, decDeg: number, czKms: number): DistanceInput => ({
  czKms,
  raRad: raDeg * DEGREE,
  decRad: decDeg * DEGREE,
});
const FIELD_A = place(24.875, 43.475, 2464.4);

function found(distance: Distance): Exclude<Distance, { kind: 'none' }> {
  if (distance.kind === 'none') throw new Error(distance.reason);
  return distance;
}

describe('chooseDistance', () => {
  it('takes a measured distance before any velocity', () => {
    const distance = found(chooseDistance({ ...FIELD_A, measuredMpc: 28, measuredErrorMpc: 2 }, FLOW, COSMOLOGY));
    expect(distance).toMatchObject({ kind: 'measured', luminosityMpc: 28, angularMpc: 28, errorMpc: 2, cautions: [] });
    expect(distance.velocityUsedKms).toBeNaN();
  });

  it('separates the two distances by (1+z) squared when the kind of the measured one is stated', () => {
    const stretch = (1 + 2464.4 / 299_792.458) ** 2;
    const angular = found(chooseDistance({ ...FIELD_A, measuredMpc: 28, measuredKind: 'angular' }, FLOW, COSMOLOGY));
    expect([angular.luminosityMpc, angular.angularMpc]).toEqual([28 * stretch, 28]);
    const luminous = found(
      chooseDistance({ ...FIELD_A, measuredMpc: 28, measuredKind: 'luminosity' }, FLOW, COSMOLOGY),
    );
    expect([luminous.luminosityMpc, luminous.angularMpc]).toEqual([28, 28 / stretch]);
  });

  it('says so when a measured distance has no error', () => {
    const distance = found(
      chooseDistance({ ...FIELD_A, measuredMpc: 10, measuredErrorMpc: Number.NaN }, FLOW, COSMOLOGY),
    );
    expect(distance.errorMpc).toBeCloseTo(1, 12);
    expect(distance.cautions.join()).toMatch(/10 per cent/);
  });

  it('uses the Local Group velocity with the Hubble law', () => {
    const distance = found(chooseDistance(FIELD_A, HUBBLE, COSMOLOGY));
    expect(distance.kind).toBe('hubble');
    // Source: 3.frames.field A, v_LG_KM96.
    expect(distance.velocityUsedKms).toBeCloseTo(2703.345570393609, 5);
    const z = distance.velocityUsedKms / 299_792.458;
    const observed = 2464.4 / 299_792.458;
    expect(distance.luminosityMpc).toBeCloseTo(luminosityDistance(z, COSMOLOGY, observed), 9);
    expect(distance.luminosityMpc / distance.angularMpc).toBeCloseTo((1 + observed) ** 2, 12);
    expect(distance.errorMpc).toBeCloseTo(200 / 70, 12);
    expect(distance.cautions).toEqual([]);
  });

  it.each([
    ['yts77', 2734.288162861551],
    ['cmb', 2218.6888559057234],
  ] as const)('uses the frame %s where the rule says so', (hubbleFrame, velocity) => {
    // Source: 3.frames.field A.
    const distance = found(chooseDistance(FIELD_A, { ...HUBBLE, hubbleFrame }, COSMOLOGY));
    expect(distance.velocityUsedKms).toBeCloseTo(velocity, 4);
  });

  it('shows every branch of the flow model', () => {
    const distance = found(chooseDistance(FIELD_A, FLOW, COSMOLOGY));
    expect(distance.kind).toBe('flow');
    // Source: 4.mould.field A.
    expect(Math.abs(distance.velocityUsedKms - 2517.5511310467605)).toBeLessThan(0.05);
    expect(distance.flow!.infalls).toHaveLength(3);
  });

  it('widens the error and warns inside the cone of a cluster, by flow and by Hubble law', () => {
    const virgo = place(184.478, 14.783, 2005);
    for (const rule of [FLOW, HUBBLE]) {
      const distance = found(chooseDistance(virgo, rule, COSMOLOGY));
      expect(distance.errorMpc).toBeCloseTo(500 / 70, 12);
      expect(distance.cautions.join()).toMatch(/Virgo cone/);
    }
  });

  it('warns of the triple-valued zone outside the cone, and of slow sources', () => {
    const distance = found(chooseDistance(place(192, 24, 1330), HUBBLE, COSMOLOGY));
    expect(distance.cautions.join('\n')).toMatch(/1500 km\/s[\s\S]*three distances/);
  });

  it.each([
    ['no velocity', place(10, 10, Number.NaN), /neither/],
    ['a negative velocity', place(185.5, 13.5, -142), /below 500 km\/s/],
    ['an infinite velocity', place(10, 10, Infinity), /not a possible velocity/],
    ['a sentinel', place(10, 10, -999_999), /not a possible velocity/],
    ['a small velocity', place(188, 20.4, 300), /below 500 km\/s/],
  ])('gives none for %s, with the reason', (_name, input, reason) => {
    for (const rule of [FLOW, HUBBLE]) {
      const distance = chooseDistance(input, rule, COSMOLOGY);
      expect(distance.kind).toBe('none');
      expect(distance.kind === 'none' && distance.reason).toMatch(reason);
    }
  });

  it('falls back on the Hubble law where the flow model turns negative', () => {
    // Only with a least velocity far below the default, where the two Local Group vectors differ in sign.
    const rule = { ...FLOW, minimumVelocityKms: 0, peculiarVelocityKms: 160 };
    const slow = place(275, -5, -105);
    const distance = found(chooseDistance(slow, rule, COSMOLOGY));
    expect(distance.flow!.cosmicKms).toBeLessThan(0);
    expect(distance.kind).toBe('hubble');
    expect(distance.cautions.join()).toMatch(/Hubble law is used instead/);
  });

  it('asks about a column in metres a second', () => {
    expect(found(chooseDistance(place(10, 10, 2_464_400), FLOW, COSMOLOGY)).cautions.join()).toMatch(/in m\/s\?/);
    expect(found(chooseDistance(FIELD_A, FLOW, COSMOLOGY)).cautions).toEqual([]);
  });

  it('adds the velocity error in quadrature', () => {
    const distance = found(chooseDistance({ ...FIELD_A, czErrorKms: 150 }, HUBBLE, COSMOLOGY));
    expect(distance.errorMpc).toBeCloseTo(250 / 70, 12);
  });

  it('refuses impossible numbers', () => {
    expect(() => chooseDistance({ ...FIELD_A, measuredMpc: -3 }, FLOW, COSMOLOGY)).toThrow(DomainError);
    expect(() => chooseDistance({ ...FIELD_A, measuredMpc: 3, measuredErrorMpc: -1 }, FLOW, COSMOLOGY)).toThrow(
      DomainError,
    );
    expect(() => chooseDistance({ ...FIELD_A, decRad: 2 }, FLOW, COSMOLOGY)).toThrow(DomainError);
  });
});
