import type { MethodEntry } from '../method-entry.ts';

export const confusion: MethodEntry = {
  id: 'confusion',
  title: 'Confusion in the beam',
  summary:
    'Two or more galaxies at the velocity of the gas in one beam: which has the gas cannot be told. Each gets the share of the flux to be expected of it.',
  formulas: [
    String.raw`f_j \propto \frac{M_{\mathrm{HI},j}}{D^2}\,\exp\!\left(-4 \ln 2\,\frac{\theta_j^2}{\mathrm{FWHM}^2}\right)`,
  ],
  symbols: [
    [String.raw`f_{j}`, 'share of the flux', ''],
    [String.raw`M_{\mathrm{HI},j}`, 'gas mass to be expected of galaxy j', 'M☉'],
    [String.raw`\theta_{j}`, 'distance from the centre of the beam', 'arcsec'],
    [String.raw`\mathrm{FWHM}`, 'beam', 'arcsec'],
  ],
  criteria: ['counterpart.confusedFluxShare'],
  columns: [],
  functions: ['counterpart/expected-flux#expectedFluxShares'],
  validity:
    'A second galaxy counts from the share of the criteria on. A confused detection is never called dark; a beam that resolves it must decide.',
  sources: ['Gaussian beam (textbook); the rule is our choice'],
};
