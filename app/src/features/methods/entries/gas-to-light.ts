import type { MethodEntry } from '../method-entry.ts';

export const gasToLight: MethodEntry = {
  id: 'gas-to-light',
  title: 'Gas to light',
  summary:
    'Solar masses of HI per solar luminosity. It does not depend on the distance. A counterpart above the limit makes the detection nearly dark; without one it is a lower limit.',
  formulas: [
    'L_{r} = 10^{−0.4 (M_{r} − M_{☉,r})},   M_{☉,r} = 4.64 (AB)',
    'M_{HI}/L_{r} > M_{HI} / L_{lim} where nothing is found',
  ],
  symbols: [
    ['L_{r}, L_{lim}', 'luminosity in r, and its limit for an extended source', 'L☉'],
    ['M_{HI}', 'gas mass', 'M☉'],
  ],
  criteria: ['counterpart.nearlyDarkRatio', 'absence.stellarMassToLight'],
  validity:
    'Ordinary spirals have 0.1 to 1, dwarf irregulars 0.5 to 3; above 10 to 20 is rare. A limit is printed with its sign and is never ranked as a value.',
  sources: ['Willmer (2018), ApJS 236, 47'],
};
