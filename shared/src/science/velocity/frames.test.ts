import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { toGalactic } from '../sky/galactic.ts';
import {
  applyTelescopeCorrection,
  fromBarycentric,
  LSRK_APEX_DEG,
  solarMotionTowards,
  toBarycentric,
  VELOCITY_FRAMES,
  type VelocityFrame,
} from './frames.ts';

// Source: vectors named in SOLAR_MOTION, values computed with astropy 5.2; 0.05 km/s asked, met to 1e-5.
const CHECKS: [name: string, ra: number, dec: number, cz: number, expected: Record<string, number>][] = [
  [
    'field A',
    24.875,
    43.475,
    2464.4,
    {
      yts77: 2734.288162861551,
      km96: 2703.345570393609,
      gsr: 2619.6578465631765,
      cmbAdd: 2220.6922200229637,
      cmb: 2218.6888559057234,
      lsrk: 2466.186228584622,
    },
  ],
  [
    'HI1232+20 region',
    188,
    20.4,
    1330,
    {
      yts77: 1253.1525254288817,
      km96: 1264.0993633760581,
      gsr: 1304.3679998660984,
      cmbAdd: 1637.6270699913666,
      cmb: 1638.9918274833624,
      lsrk: 1335.4759706452319,
    },
  ],
  [
    'VIRGOHI21 nominal',
    184.478,
    14.783,
    2005,
    {
      yts77: 1895.9021290859037,
      km96: 1904.3799895784914,
      gsr: 1953.2414477807079,
      cmbAdd: 2333.8659681862073,
      cmb: 2336.0654106625316,
      lsrk: 2008.5797006792104,
    },
  ],
  [
    'south',
    150,
    -40,
    3000,
    {
      yts77: 2701.958748361353,
      km96: 2687.256081230017,
      gsr: 2774.5898585165155,
      cmbAdd: 3296.2851290738977,
      cmb: 3299.2500315038615,
      lsrk: 2986.745917480623,
    },
  ],
  [
    'NGP',
    192.859508,
    27.128336,
    1000,
    {
      yts77: 964.0004693267701,
      km96: 977.9574263816453,
      gsr: 1007.0003394410289,
      cmbAdd: 1275.919480170077,
      cmb: 1276.839848487581,
      lsrk: 1007.7390023477265,
    },
  ],
  [
    'AGC-like negative cz',
    185.5,
    13.5,
    -142,
    {
      yts77: -256.1065191586605,
      km96: -246.22686572251266,
      gsr: -195.93169811306998,
      cmbAdd: 187.89554814701734,
      cmb: 187.73928948676067,
      lsrk: -138.33199664582582,
    },
  ],
];

describe('fromBarycentric', () => {
  it.each(CHECKS)('gives the check values 3.frames.%s', (_name, ra, dec, cz, expected) => {
    for (const [key, value] of Object.entries(expected)) {
      const frame = (key === 'cmbAdd' ? 'cmb' : key) as VelocityFrame;
      const combination = key === 'cmbAdd' ? ('additive' as const) : undefined;
      expect(Math.abs(fromBarycentric(frame, cz, ra * DEGREE, dec * DEGREE, combination) - value)).toBeLessThan(1e-5);
    }
  });

  it('moves 20 km/s to the apex of the LSRK (3.lsrk.apex)', () => {
    // Source: Gordon (1975) convention, precessed with astropy; 0.01 deg.
    const [ra, dec] = [270.95939256958127, 30.00467095334566];
    const { lon, lat } = toGalactic(ra * DEGREE, dec * DEGREE);
    expect(Math.abs(lon / DEGREE - LSRK_APEX_DEG.l)).toBeLessThan(0.01);
    expect(Math.abs(lat / DEGREE - LSRK_APEX_DEG.b)).toBeLessThan(0.01);
    expect(solarMotionTowards('lsrk', ra * DEGREE, dec * DEGREE)).toBeCloseTo(20, 6);
  });

  it.each(VELOCITY_FRAMES)('is undone by toBarycentric in %s', (frame) => {
    for (const cz of [-300, 0, 2464.4, 30_000]) {
      expect(toBarycentric(frame, fromBarycentric(frame, cz, 2, -0.7), 2, -0.7)).toBeCloseTo(cz, 9);
    }
  });

  it('adds the correction of the telescope relativistically', () => {
    // Form stated with 3.topo: v_bary = v_topo + v + v_topo v/c.
    expect(applyTelescopeCorrection(2439.385, 24.812641455187094)).toBeCloseTo(2464.39954, 4);
  });

  it('refuses what is not finite and unknown frames', () => {
    expect(() => fromBarycentric('cmb', Number.NaN, 0, 0)).toThrow(DomainError);
    expect(() => fromBarycentric('galaxy' as VelocityFrame, 0, 0, 0)).toThrow(/known are/);
    expect(() => toBarycentric('lsrk', 0, 0, 2)).toThrow(DomainError);
  });
});
