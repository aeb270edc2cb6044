import type { MethodEntry } from '../method-entry.ts';

export const expected: MethodEntry = {
  id: 'expected',
  title: 'The ordinary counterpart',
  summary:
    'The light that a galaxy with this much gas has as a rule, with its scatter. It tells how an object’s magnitude weighs, and whether silence means anything.',
  formulas: [
    'log M_{*} = a + b (log M_{HI} − 9.5)',
    'M_{r} = M_{☉,r} − 2.5 (log M_{*} − log Υ_{r}) − 0.5',
    'm = M_{r} + colour + 5 log(D_{L}/Mpc) + 25 + A',
    'σ_{m} = s exp(−0.4 (log M_{HI} − 9.5)), clipped to 0.7–2.5 mag',
  ],
  symbols: [
    ['M_{*}, M_{HI}', 'mass of stars, of gas', 'M☉'],
    ['a, b', 'intercept and slope', 'dex; dex/dex'],
    ['Υ_{r}', 'mass-to-light ratio of the stars in r', 'solar'],
    ['s', 'scatter at log M_{HI} = 9.5', 'mag'],
    ['A', 'Galactic extinction in the band', 'mag'],
  ],
  criteria: [
    'counterpart.relationSlope',
    'counterpart.relationIntercept',
    'counterpart.relationScatterMag',
    'counterpart.relationTail',
    'counterpart.massToLightR',
    'counterpart.learnMagnitudes',
  ],
  validity:
    'The half magnitude and the line come from a direct fit on published assignments and are refitted on the survey’s own secure counterparts where there are 200 or more. A wide tail allows for galaxies far off the relation. Without a distance the flux alone is used, with a scatter of at least 1.5 mag.',
  sources: ['direct fit on published assignments; a starting point', 'Willmer (2018), ApJS 236, 47, solar magnitudes'],
};
