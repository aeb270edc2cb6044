import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { toIcrs } from '../sky/frames.ts';
import { separation } from '../sky/separation.ts';
import { luminosityDistance } from './cosmology.ts';
import { type Attractor, ATTRACTORS, flowVelocity } from './flow-model.ts';
import { hubbleDistance } from './hubble.ts';

type Branch = [angleDeg: number, separationKms: number, infallKms: number];
interface Check {
  name: string;
  place: [raDeg: number, decDeg: number, czKms: number];
  localGroup: number;
  branches: [virgo: Branch, greatAttractor: Branch, shapley: Branch];
  smooth: number;
  collapsedOn: Attractor['name'] | null;
  cosmic: number;
  linearMpc: number;
  luminosityMpc: number;
}

// Source: Mould et al. (2000), ApJ 529, 786, appendix A, with B1950 centres; values computed with astropy 5.2. Asked:
// 0.3 km/s and 0.01 Mpc. The smooth solution near an attractor follows its position, hence the wider limit there.
const CHECKS: Check[] = [
  {
    name: 'field A',
    place: [24.875, 43.475, 2464.4],
    localGroup: 2734.288162861551,
    branches: [
      [121.97662290675947, 3341.2069350925376, -50.346453577798535],
      [176.9137036691813, 7111.846102149442, -153.2057599705991],
      [167.71054767529517, 16282.03623791827, -13.18481826639281],
    ],
    smooth: 2517.5511310467605,
    collapsedOn: null,
    cosmic: 2517.5511310467605,
    linearMpc: 35.965016157810865,
    luminosityMpc: 36.19838870953177,
  },
  {
    name: 'HI1232+20',
    place: [188.0, 20.4, 1330.0],
    localGroup: 1253.1525254288817,
    branches: [
      [8.014151724517381, 333.36347671583604, 724.2039887469964],
      [65.70339619953009, 4029.6324459261214, 105.34479855991428],
      [53.678086601072955, 12897.312659425297, 3.0732784625865364],
    ],
    smooth: 2085.774591198379,
    collapsedOn: 'Virgo',
    cosmic: 957.0,
    linearMpc: 13.67142857142857,
    luminosityMpc: 13.705213025995713,
  },
  {
    name: 'VIRGOHI21 (inside Virgo cone)',
    place: [184.478, 14.783, 2005.0],
    localGroup: 1895.9021290859037,
    branches: [
      [3.9499911969392567, 943.4813829146902, 401.8947772450821],
      [60.87659571706211, 3833.5114283814737, 166.5641922578839],
      [49.4283864541703, 12450.4768062654, 3.4587372066008584],
    ],
    smooth: 2467.81983579547,
    collapsedOn: 'Virgo',
    cosmic: 957.0,
    linearMpc: 13.67142857142857,
    luminosityMpc: 13.705213025995713,
  },
  {
    name: 'south',
    place: [150.0, -40.0, 3000.0],
    localGroup: 2701.958748361353,
    branches: [
      [63.00109397910452, 2422.536671342696, 164.74665620818965],
      [37.264786714797204, 2765.498408667646, 138.77489131660244],
      [43.46930897852109, 11786.5749796979, 2.041041585649168],
    ],
    smooth: 3007.521337471794,
    collapsedOn: null,
    cosmic: 3007.521337471794,
    linearMpc: 42.964590535311345,
    luminosityMpc: 43.297448714779016,
  },
  {
    name: 'GA cone',
    place: [200.0, -44.5, 4300.0],
    localGroup: 4021.419835382613,
    branches: [
      [57.97568630563578, 3606.3984298271666, 157.76756412678455],
      [0.5768874746421, 361.0614148438828, -4416.05080179583],
      [13.479995068344936, 9734.605250874272, -29.619440686255146],
    ],
    smooth: -266.4828429726877,
    collapsedOn: 'Great Attractor',
    cosmic: 4380.0,
    linearMpc: 62.57142857142857,
    luminosityMpc: 63.276260017658466,
  },
  {
    name: 'anti-Virgo',
    place: [5.0, -13.0, 1500.0],
    localGroup: 1617.1329868912026,
    branches: [
      [177.28518513710335, 2573.4581364318756, -125.41243893419285],
      [120.97497060327824, 5393.541234312984, 27.292177994239694],
      [132.41720427808323, 14739.224794154288, 0.08457891827945474],
    ],
    smooth: 1519.097304869529,
    collapsedOn: null,
    cosmic: 1519.097304869529,
    linearMpc: 21.7013900695647,
    luminosityMpc: 21.78646003484659,
  },
  {
    name: 'low velocity',
    place: [188.0, 20.4, 300.0],
    localGroup: 223.1525254288817,
    branches: [
      [8.014151724517381, 736.6840939619875, -57.469438494865415],
      [65.70339619953009, 4293.002184217828, 14.475371820993303],
      [53.678086601072955, 13469.022057272694, 0.4380061263087711],
    ],
    smooth: 180.59646488131835,
    collapsedOn: null,
    cosmic: 180.59646488131835,
    linearMpc: 2.579949498304548,
    luminosityMpc: 2.581153727158694,
  },
];

const at = (raDeg: number, decDeg: number, czKms: number, attractors?: readonly Attractor[]) =>
  flowVelocity(czKms, raDeg * DEGREE, decDeg * DEGREE, attractors);

/** The published centres taken, wrongly, as J2000. */
const MISTAKEN: readonly Attractor[] = ATTRACTORS.map((attractor, i) => {
  const centres = [
    [187.07916666666668, 12.666666666666666],
    [200, -44],
    [202.5, -31],
  ] as const;
  const [ra, dec] = centres[i]!;
  return { ...attractor, ra: ra * DEGREE, dec: dec * DEGREE };
});

describe('flowVelocity', () => {
  it.each(CHECKS)('gives every branch of the check value 4.mould.$name', (check) => {
    const flow = at(...check.place);
    expect(Math.abs(flow.localGroupKms - check.localGroup)).toBeLessThan(1e-3);
    check.branches.forEach(([angleDeg, separationKms, infallKms], i) => {
      const branch = flow.infalls[i]!;
      expect(Math.abs(branch.angle / DEGREE - angleDeg)).toBeLessThan(1e-5);
      expect(Math.abs(branch.separationKms - separationKms)).toBeLessThan(0.01);
      expect(Math.abs(branch.infallKms - infallKms)).toBeLessThan(0.05);
    });
    expect(Math.abs(flow.smoothKms - check.smooth)).toBeLessThan(0.05);
    expect(flow.collapsedOn).toBe(check.collapsedOn);
    expect(Math.abs(flow.cosmicKms - check.cosmic)).toBeLessThan(0.05);
    expect(Math.abs(hubbleDistance(flow.cosmicKms, 70) - check.linearMpc)).toBeLessThan(0.001);
    const luminosity = luminosityDistance(flow.cosmicKms / 299_792.458, { h0: 70, omegaM: 0.3 });
    expect(Math.abs(luminosity - check.luminosityMpc)).toBeLessThan(0.001);
  });

  // 4.mould.b1950_pitfall.*: 0.3 km/s.
  it.each([
    ['HI1232+20 smooth', 188, 20.4, 1330, 2085.774591198379, 2090.5306206784626],
    ['south', 150, -40, 3000, 3007.521337471794, 3001.7648788660845],
    ['outside Virgo cone', 192, 24, 1330, 2001.6130867809204, 2002.00005846032],
  ])('shows what taking the centres as J2000 would do: %s', (_name, ra, dec, cz, right, wrong) => {
    expect(Math.abs(at(ra, dec, cz).smoothKms - right)).toBeLessThan(0.05);
    expect(Math.abs(at(ra, dec, cz, MISTAKEN).smoothKms - wrong)).toBeLessThan(0.3);
  });

  it('collapses to the same velocity under that mistake (4.mould.b1950_pitfall)', () => {
    expect(at(188, 20.4, 1330).cosmicKms).toBe(957);
    expect(at(188, 20.4, 1330, MISTAKEN).cosmicKms).toBe(957);
  });

  it('gives three distances for one velocity near Virgo (4.mould.threeD.HI1232)', () => {
    // Source: computed with astropy 5.2; 0.05 Mpc.
    const flow = at(188, 20.4, 1330);
    expect(hubbleDistance(1330, 70)).toBeCloseTo(19, 9);
    expect(Math.abs(hubbleDistance(flow.localGroupKms, 70) - 17.90217893469831)).toBeLessThan(0.001);
    expect(Math.abs(hubbleDistance(flow.cosmicKms, 70) - 13.67142857142857)).toBeLessThan(0.001);
    expect(Math.abs(hubbleDistance(flow.smoothKms, 70) - 29.796779874262555)).toBeLessThan(0.001);
  });

  it('has M87 at its first centre, within 0.4 arcmin', () => {
    const virgo = ATTRACTORS[0]!;
    expect(separation(virgo.ra, virgo.dec, 187.705931 * DEGREE, 12.391123 * DEGREE) / DEGREE).toBeLessThan(0.4 / 60);
  });

  it('stays finite at the very centre of an attractor', () => {
    const { lon, lat } = toIcrs('b1950', 200 * DEGREE, -44 * DEGREE);
    const flow = flowVelocity(4620, lon, lat);
    expect(flow.cosmicKms).toBe(4380);
    expect(flow.infalls.every((infall) => Number.isFinite(infall.infallKms))).toBe(true);
  });
});
