import type { MethodEntry } from '../method-entry.ts';

export const expected: MethodEntry = {
  id: 'expected',
  title: 'The ordinary counterpart',
  summary:
    'The light that a galaxy with this much gas has as a rule, with its scatter. It tells how an object’s magnitude weighs, and whether silence means anything.',
  formulas: [
    String.raw`\log M_* = a + b\,(\log M_{\mathrm{HI}} - 9.5)`,
    String.raw`M_r = M_{\odot,r} - 2.5\,(\log M_* - \log \Upsilon_r) - 0.5`,
    String.raw`m = M_r + \text{colour} + 5 \log(D_L/\mathrm{Mpc}) + 25 + A`,
    String.raw`\sigma_m = s\,e^{-0.4\,(\log M_{\mathrm{HI}} - 9.5)}, \quad 0.7 \le \sigma_m \le 2.5`,
  ],
  symbols: [
    [String.raw`M_{*}, M_{\mathrm{HI}}`, 'mass of stars, of gas', 'M☉'],
    [String.raw`a, b`, 'intercept and slope', 'dex; dex/dex'],
    [String.raw`\Upsilon_{r}`, 'mass-to-light ratio of the stars in r', 'solar'],
    [String.raw`s`, 'scatter at log M_HI = 9.5', 'mag'],
    [String.raw`A`, 'Galactic extinction in the band', 'mag'],
  ],
  criteria: [
    'counterpart.relationSlope',
    'counterpart.relationIntercept',
    'counterpart.relationScatterMag',
    'counterpart.relationTail',
    'counterpart.massToLightR',
    'counterpart.learnMagnitudes',
  ],
  columns: ['expectedMagnitude', 'expectedScatterMag'],
  functions: [
    'hydrogen/expected-counterpart#expectedCounterpart',
    'hydrogen/gas-relation#stellarMassFromGas',
    'photometry/size-prior#sizePriorKpc',
  ],
  validity:
    'The half magnitude and the line come from a direct fit on published assignments and are refitted on the survey’s own secure counterparts where there are 200 or more. A wide tail allows for galaxies far off the relation. Without a distance the flux alone is used, with a scatter of at least 1.5 mag.',
  sources: ['direct fit on published assignments; a starting point', 'Willmer (2018), ApJS 236, 47, solar magnitudes'],
};
