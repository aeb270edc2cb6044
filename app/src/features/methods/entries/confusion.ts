import type { MethodEntry } from '../method-entry.ts';

export const confusion: MethodEntry = {
  id: 'confusion',
  title: 'Confusion in the beam',
  summary:
    'Two or more galaxies at the velocity of the gas in one beam: which has the gas cannot be told. Each gets the share of the flux to be expected of it.',
  formulas: ['f_{j} ∝ (M_{HI,j} / D^{2}) exp(−4 ln 2 θ_{j}^{2} / FWHM^{2})'],
  symbols: [
    ['f_{j}', 'share of the flux', ''],
    ['M_{HI,j}', 'gas mass to be expected of galaxy j', 'M☉'],
    ['θ_{j}', 'distance from the centre of the beam', 'arcsec'],
    ['FWHM', 'beam', 'arcsec'],
  ],
  criteria: ['counterpart.confusedFluxShare'],
  validity:
    'A second galaxy counts from the share of the criteria on. A confused detection is never called dark; a beam that resolves it must decide.',
  sources: ['Gaussian beam (textbook); the rule is our choice'],
};
