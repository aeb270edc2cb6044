import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { debris } from './debris.ts';
import type { DebrisNeighbour } from './debris.ts';
import { escapeSpeed, freeFlightKpc, tidalRadius } from './tidal.ts';

const neighbour = (values: Partial<DebrisNeighbour>): DebrisNeighbour => ({
  name: 'neighbour',
  separationRad: 0.2 * DEGREE,
  distanceMpc: 28,
  velocityDifferenceKms: 100,
  logHiMass: 9.6,
  logStellarMass: 10.2,
  ...values,
});
const of = (...neighbours: DebrisNeighbour[]) => debris({ neighbours, covered: true, hasVelocity: true });

describe('debris in numbers', () => {
  it('drifts 153.4 kpc at 200 km/s in 0.75 Gyr (1 km/s Gyr = 1.022712 kpc)', () => {
    expect(Math.abs(freeFlightKpc(200, 0.75) / 153.40682475 - 1)).toBeLessThan(1e-6);
  });

  it('escapes 1e12 solar masses at 250 kpc above 185.5 km/s (energy)', () => {
    expect(Math.abs(escapeSpeed(1e12, 250) / 185.49199443641766 - 1)).toBeLessThan(1e-6);
  });

  it('is held inside 14.94 kpc by 1e9 at 100 kpc from 1e11 solar masses (estimate of the kind of King 1962)', () => {
    expect(Math.abs(tidalRadius(1e9, 1e11, 100) / 14.938015821857217 - 1)).toBeLessThan(1e-6);
    expect(() => tidalRadius(0, 1e11, 100)).toThrow(DomainError);
  });
});

describe('doubt of debris', () => {
  it('is serious within 250 kpc and 300 km/s of a galaxy that can shed gas, and names it', () => {
    const result = of(neighbour({ name: 'far', separationRad: 5 * DEGREE }), neighbour({ name: 'near' }));
    expect(result).toMatchObject({ grade: 'serious', responsible: 1, unit: 'kpc' });
    expect(result.value).toBeCloseTo(28_000 * 0.2 * DEGREE, 9);
    expect(result.sentence).toContain('near is 98 kpc and 100 km/s away at its own distance');
  });

  it('does not call a distance the own one of a neighbour that has none', () => {
    const { sentence } = of(neighbour({ distanceTaken: true }));
    expect(sentence).toContain('away at the distance of the gas');
    expect(sentence).not.toContain('own');
  });

  it('is watched within 500 kpc and 500 km/s', () => {
    expect(of(neighbour({ separationRad: 0.8 * DEGREE })).grade).toBe('watch');
    expect(of(neighbour({ velocityDifferenceKms: -450 })).grade).toBe('watch');
  });

  it('includes its limits and nothing beyond', () => {
    const edge = 250 / 28_000;
    expect(of(neighbour({ separationRad: edge, velocityDifferenceKms: 300 })).grade).toBe('serious');
    expect(of(neighbour({ separationRad: edge * 1.0001 })).grade).toBe('watch');
    expect(of(neighbour({ separationRad: 2.0001 * edge })).grade).toBe('clear');
    expect(of(neighbour({ velocityDifferenceKms: 500.1 })).grade).toBe('clear');
  });

  it("works at the neighbour's distance: the same angle at four times the distance is too far", () => {
    expect(of(neighbour({ distanceMpc: 7 })).grade).toBe('serious');
    expect(of(neighbour({ distanceMpc: 160 })).grade).toBe('clear');
  });

  it('ignores a dwarf and counts a galaxy of unknown mass for one grade less', () => {
    expect(of(neighbour({ logHiMass: 8, logStellarMass: 8 })).grade).toBe('clear');
    expect(of(neighbour({ logHiMass: NaN, logStellarMass: NaN })).grade).toBe('watch');
    expect(of(neighbour({ logHiMass: NaN, logStellarMass: NaN, separationRad: 0.8 * DEGREE })).grade).toBe('clear');
  });

  it('fires for VIRGOHI 21: a galaxy above 1e10 within 250 kpc, joined by a bridge (Haynes et al. 2007; Duc & Bournaud 2008)', () => {
    // NGC 4254 at 16 Mpc, some 0.5 degrees and 400 km/s away; velocities and masses from memory
    const parent = neighbour({
      name: 'NGC 4254',
      separationRad: 0.47 * DEGREE,
      distanceMpc: 16,
      velocityDifferenceKms: 400,
    });
    expect(of(parent).grade).toBe('watch');
    expect(of({ ...parent, bridge: true })).toMatchObject({ grade: 'serious', responsible: 0 });
  });

  it('never lets a missing distance or velocity pass', () => {
    expect(of(neighbour({ distanceMpc: NaN })).grade).toBe('clear');
    expect(of(neighbour({ distanceMpc: -99 })).grade).toBe('clear');
    expect(of(neighbour({ velocityDifferenceKms: NaN })).grade).toBe('clear');
  });

  it('is not testable without a velocity or without redshifts', () => {
    expect(debris({ neighbours: [], covered: true, hasVelocity: false }).grade).toBe('not testable here');
    expect(debris({ neighbours: [], covered: false, hasVelocity: true }).grade).toBe('not testable here');
    expect(debris({ neighbours: [neighbour({})], covered: false, hasVelocity: true }).grade).toBe('serious');
  });
});
