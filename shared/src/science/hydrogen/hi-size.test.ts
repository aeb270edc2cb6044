import { describe, expect, it } from 'vitest';
import { ARCSECOND } from '../constants.ts';
import { hiMass } from './hi-mass.ts';
import { hiDiameterArcmin, hiDiameterKpc, meanHiSurfaceDensity } from './hi-size.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('HI size', () => {
  // Wang et al. (2016), MNRAS 460, 2143: [log M, kpc, arcmin at 28 Mpc, solar masses per square parsec]
  it.each([
    [6, 0.5533501092157366, 0.06793848396678186, 4.1582454275114875],
    [7, 1.7741894808901644, 0.21782907709609892, 4.044921695395063],
    [7.919, 5.176235178923654, 0.6355209203988641, 3.943502483191401],
    [8, 5.688529308438413, 0.6984186878785585, 3.934686349590758],
    [9, 18.238957023196384, 2.2393184146063807, 3.827455222997527],
    [10, 58.47900841444812, 7.179857940552655, 3.7231464423014864],
  ])('of log mass %d', (logMass, kpc, arcmin, surface) => {
    expect(off(hiDiameterKpc(logMass), kpc)).toBeLessThan(1e-6);
    expect(off(hiDiameterArcmin(logMass, 28), arcmin)).toBeLessThan(1e-6);
    expect(off(meanHiSurfaceDensity(logMass), surface)).toBeLessThan(1e-6);
  });

  it('in angle hardly depends on distance for a given flux', () => {
    const at = (mpc: number) => hiDiameterArcmin(Math.log10(hiMass(1, mpc)), mpc);
    expect(at(100) / at(10)).toBeCloseTo(10 ** 0.012, 6);
  });

  it('of Cloud-9 is 4.6 times smaller than its diameter (Anand et al. 2025: radius 1 arcmin, 1e6 solar masses, 4.4 Mpc)', () => {
    const observedKpc = 2 * 60 * ARCSECOND * 4400;
    expect(off(observedKpc / hiDiameterKpc(6), 4.626033669508765)).toBeLessThan(1e-6);
  });
});
