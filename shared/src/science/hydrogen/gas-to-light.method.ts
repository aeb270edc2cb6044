import type { MethodEntry } from '../method-entry.ts';

export const gasToLight: MethodEntry = {
  id: 'gas-to-light',
  title: 'Gas to light',
  summary:
    'Solar masses of HI per solar luminosity. It does not depend on the distance. A counterpart above the limit makes the detection nearly dark; without one it is a lower limit.',
  formulas: [
    String.raw`L_r = 10^{-0.4\,(M_r - M_{\odot,r})}, \qquad M_{\odot,r} = 4.64 \text{ (AB)}`,
    String.raw`\frac{M_{\mathrm{HI}}}{L_r} > \frac{M_{\mathrm{HI}}}{L_{\mathrm{lim}}} \text{ where nothing is found}`,
  ],
  symbols: [
    [String.raw`L_{r}, L_{\mathrm{lim}}`, 'luminosity in r, and its limit for an extended source', 'L☉'],
    [String.raw`M_{\mathrm{HI}}`, 'gas mass', 'M☉'],
  ],
  criteria: ['counterpart.nearlyDarkRatio', 'absence.stellarMassToLight'],
  columns: ['gasToLight', 'gasToLightIsLimit'],
  functions: ['hydrogen/gas-to-light#gasToLight'],
  validity:
    'Ordinary spirals have 0.1 to 1, dwarf irregulars 0.5 to 3; above 10 to 20 is rare. A limit is printed with its sign and is never ranked as a value.',
  sources: ['Willmer (2018), ApJS 236, 47'],
};
