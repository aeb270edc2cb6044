import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { cloud } from './cloud.ts';
import { GALACTIC_DISC, deviationVelocity, discVelocities } from './deviation-velocity.ts';
import { magellanic, nearbyGas } from './nearby-gas.ts';

describe('deviation velocity', () => {
  // Wakker (1991), A&A 250, 499; flat 220 km/s, R0 8.5, R < 20, |z| < 5 kpc, solid body inside 0.5 kpc; to 0.1 km/s
  it.each([
    [90, 10, -150, -124.57757202152737, 0, -25.422427978472626],
    [90, -40, -150, -30.531015955296375, 0, -119.46898404470363],
    [270, 30, 250, 0, 57.06759673899581, 192.9324032610042],
    [132.1, -18.5, -200, -89.00913037562884, 0, -110.99086962437116],
    [45, 5, 60, -89.10787757203124, 64.19130771786222, 0],
    [200, 60, -120, 0, 9.211802665727724, -120],
  ])('towards l %d, b %d of %d km/s', (l, b, v, min, max, deviation) => {
    const range = discVelocities(l * DEGREE, b * DEGREE);
    expect(Math.abs(range.min - min)).toBeLessThan(0.1);
    expect(Math.abs(range.max - max)).toBeLessThan(0.1);
    expect(Math.abs(deviationVelocity(l * DEGREE, b * DEGREE, v) - deviation)).toBeLessThan(0.1);
  });

  it.each([
    [10, 0],
    [100, 3],
    [200, -30],
    [300, 0.5],
    [355, 80],
    [180, 90],
  ])('has the extremes of a fine walk along the sight line at l %d, b %d', (l, b) => {
    const { speedKms, sunKpc, radiusKpc, heightKpc, solidKpc } = GALACTIC_DISC;
    let min = 0;
    let max = 0;
    for (let d = 0; d < 40; d += 0.001) {
      const inPlane = d * Math.cos(b * DEGREE);
      const radius = Math.sqrt(sunKpc ** 2 + inPlane ** 2 - 2 * sunKpc * inPlane * Math.cos(l * DEGREE));
      if (radius > radiusKpc || d * Math.sin(Math.abs(b) * DEGREE) > heightKpc) break;
      const speed = radius < solidKpc ? (speedKms * radius) / solidKpc : speedKms;
      const v = (speed / radius - speedKms / sunKpc) * sunKpc * Math.sin(l * DEGREE) * Math.cos(b * DEGREE);
      min = Math.min(min, v);
      max = Math.max(max, v);
    }
    const range = discVelocities(l * DEGREE, b * DEGREE);
    expect(Math.abs(range.min - min)).toBeLessThan(0.1);
    expect(Math.abs(range.max - max)).toBeLessThan(0.1);
  });

  it('refuses a missing velocity', () => {
    expect(() => deviationVelocity(0, 0, NaN)).toThrow(DomainError);
  });
});

describe('known gas near the Galaxy', () => {
  it('is the Stream at the south Galactic pole side and M31 at M31', () => {
    expect(nearbyGas(90 * DEGREE, -45 * DEGREE)).toBe('Magellanic Stream');
    expect(nearbyGas(121.2 * DEGREE, -21.6 * DEGREE)).toBe('M31');
    expect(nearbyGas(133.6 * DEGREE, -31.3 * DEGREE)).toBe('M33');
    expect(nearbyGas(180 * DEGREE, 70 * DEGREE)).toBeUndefined();
  });

  it('is measured from the Large Cloud, backwards along the tail (Nidever et al. 2008, from memory)', () => {
    expect(magellanic(280.465 * DEGREE, -32.888 * DEGREE).lon).toBeCloseTo(0, 9);
    const tail = magellanic(90 * DEGREE, -45 * DEGREE);
    expect(tail.lon).toBeLessThan(-80 * DEGREE);
    expect(tail.lon).toBeGreaterThan(-120 * DEGREE);
  });
});

describe('doubt of a cloud', () => {
  const at = (l: number, b: number, lsrKms: number, localGroupKms: number, width50Kms = 60) =>
    cloud({ galacticLonRad: l * DEGREE, galacticLatRad: b * DEGREE, lsrKms, localGroupKms, width50Kms });

  it('is clear for a galaxy at 2500 km/s, with the deviation velocity as its number', () => {
    const result = at(132, -18, 2466, 2734);
    expect(result).toMatchObject({ name: 'cloud', grade: 'clear', unit: 'km/s' });
    expect(result.value).toBeGreaterThan(2400);
  });

  it('is serious for Complex H, near l 131, b +1 at -200 km/s (Simon et al. 2006)', () => {
    expect(at(131, 1, -200, 0).grade).toBe('serious');
  });

  it('is serious below 100 km/s anywhere and inside the range of the disc', () => {
    expect(at(200, 80, 90, 60).grade).toBe('serious');
    expect(at(90, 10, -150, 100).grade).toBe('serious');
  });

  it('says that a narrow line is like that of compact clouds', () => {
    expect(at(200, 60, 180, 100, 23).sentence).toContain('only 23 km/s wide');
    expect(at(200, 60, 180, 100, NaN).sentence).not.toContain('NaN');
  });

  it('is watched near the Stream and M31 up to 450 km/s', () => {
    expect(at(90, -45, -430, -200).grade).toBe('watch');
    expect(at(121, -21, -440, -150).grade).toBe('watch');
    expect(at(180, 70, 430, 400).grade).toBe('clear');
  });

  it('is not testable without a velocity', () => {
    expect(at(10, 10, NaN, NaN)).toMatchObject({ grade: 'not testable here' });
  });
});
