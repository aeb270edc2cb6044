import { describe, expect, it } from 'vitest';
import { blendNumber, hiDensity } from './blend-probability.ts';
import { blend } from './blend.ts';

describe('chance of a blend', () => {
  it('rests on 0.0331 galaxies per cubic Mpc above 1e8 (Jones et al. 2018, from memory)', () => {
    expect(Math.abs(hiDensity(8) / 0.03314101399722286 - 1)).toBeLessThan(1e-9);
  });

  // Method after Jones et al. (2015), MNRAS 449, 1856: [beam arcmin, Mpc, uniform, HI clustering, chance, optical clustering]
  it.each([
    [0.5, 28, 2.466754508314495e-6, 0.0007357878588739227, 0.0007355172333657345, 0.012964222125449803],
    [0.5, 100, 3.1463705463195084e-5, 0.004918310424009931, 0.004906235339745102, 0.059745191365303624],
    [2.9, 28, 8.298162165969961e-5, 0.010147706184155716, 0.010096391934414362, 0.10693369178530233],
    [2.9, 100, 0.0010584390517818828, 0.06812969325202728, 0.06586068584489568, 0.49331076324518713],
    [3.5, 28, 0.00012087097090741026, 0.013440442775383966, 0.013350523327587127, 0.13402114589603378],
    [3.5, 100, 0.001541721567696559, 0.09030325505917224, 0.08634592696447319, 0.6184091381818079],
    [15.5, 28, 0.0023705510824902297, 0.12466960786960891, 0.11721147921216912, 0.8009127168030417],
    [15.5, 100, 0.030236620950130483, 0.8452366813377571, 0.5705442979689107, 3.709053883281521],
  ])('in a beam of %d arcmin at %d Mpc', (beam, mpc, uniform, clustered, chance, optical) => {
    const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);
    expect(off(blendNumber(beam, mpc, 8, { clustering: null }), uniform)).toBeLessThan(1e-6);
    expect(off(blendNumber(beam, mpc), clustered)).toBeLessThan(1e-6);
    expect(off(blendNumber(beam, mpc, 8, { clustering: { lengthMpc: 5 / 0.7, slope: 1.8 } }), optical)).toBeLessThan(
      1e-6,
    );
    const result = blend({ beamArcmin: beam, distanceMpc: mpc, galaxiesAtVelocity: 0 });
    expect(off(result.value!, chance)).toBeLessThan(1e-6);
  });
});

describe('doubt of a blend', () => {
  it('grows with beam and distance', () => {
    const grade = (beamArcmin: number, distanceMpc: number) =>
      blend({ beamArcmin, distanceMpc, galaxiesAtVelocity: 1 }).grade;
    expect(grade(0.5, 28)).toBe('clear');
    expect(grade(2.9, 100)).toBe('watch');
    expect(grade(15.5, 100)).toBe('serious');
  });

  it('is serious with two galaxies at the velocity in the beam, whatever is known besides', () => {
    expect(blend({ beamArcmin: NaN, distanceMpc: NaN, galaxiesAtVelocity: 2 })).toMatchObject({
      grade: 'serious',
      value: 2,
    });
  });

  it('is not testable without a beam or a distance', () => {
    expect(blend({ beamArcmin: NaN, distanceMpc: 28, galaxiesAtVelocity: 0 }).grade).toBe('not testable here');
    expect(blend({ beamArcmin: 3, distanceMpc: NaN, galaxiesAtVelocity: 0 }).grade).toBe('not testable here');
  });
});
