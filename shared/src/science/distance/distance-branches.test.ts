import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { distanceBranches } from './distance-branches.ts';

const COSMOLOGY = { h0: 70, omegaM: 0.3 };
const of = (czKms: number, ra: number, dec: number) => distanceBranches(czKms, ra * DEGREE, dec * DEGREE, COSMOLOGY);

describe('the branches of a distance', () => {
  it('give the velocities of the check values at (24.875, +43.475), cz 2464.4', () => {
    // Check values 3.frames and 4.mould, computed independently: KM96 2703.3456, YTS77 2734.2882, CMB 2218.6889, flow 2517.5511 km/s.
    expect(of(2464.4, 24.875, 43.475).map(({ velocityKms }) => velocityKms.toFixed(2))).toEqual([
      '2703.35',
      '2734.29',
      '2218.69',
      '2517.55',
    ]);
  });

  it('say what each attractor adds', () => {
    // Check value 4.mould: -50.3, -153.2, -13.2 km/s.
    expect(of(2464.4, 24.875, 43.475).at(-1)!.note).toBe('Virgo −50, Great Attractor −153, Shapley −13 km/s');
  });

  it('show the cluster beside the smooth solution inside a cone', () => {
    // HI1232+20, 8 degrees from M87: collapsed 13.67 Mpc, smooth 29.80 Mpc by Hubble's law (4.mould.threeD.HI1232).
    const branches = of(1330, 188.2, 20.4);
    const [smooth, collapsed] = branches.slice(-2);
    expect([smooth!.name, collapsed!.name]).toEqual(['Flow model, smooth infall', 'Flow model, at Virgo']);
    expect(collapsed!.velocityKms / 70).toBeCloseTo(13.67, 2);
    expect(smooth!.luminosityMpc / collapsed!.luminosityMpc).toBeGreaterThan(2);
  });

  it('give no distance to what approaches, and none without a velocity', () => {
    expect(of(-800, 24.875, 43.475).every(({ luminosityMpc }) => Number.isNaN(luminosityMpc))).toBe(true);
    expect(of(NaN, 24.875, 43.475)).toEqual([]);
  });
});
