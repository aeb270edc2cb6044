import type { MethodEntry } from '../method-entry.ts';

export const limits: MethodEntry = {
  id: 'limits',
  title: 'Limits on light, stars and star formation',
  summary:
    'What the silence of a band allows at the distance of the gas, for a galaxy of stated size, never for a point source.',
  formulas: [
    String.raw`M_{\mathrm{lim}} = m_{\mathrm{lim}}(r_e) - A_b - 5\log(D_L/\mathrm{Mpc}) - 25`,
    String.raw`L_{\mathrm{lim}} = 10^{-0.4\,(M_{\mathrm{lim}} - M_{\odot})}, \qquad M_{*,\mathrm{lim}} = \Upsilon\,L_{\mathrm{lim}}`,
    String.raw`\log \mathrm{SFR} = \log(\nu L_\nu) - 43.35 \text{ (FUV)}, \quad -\,43.17 \text{ (NUV)}`,
  ],
  symbols: [
    [String.raw`m_{\mathrm{lim}}(r_e)`, 'limit for the half-light radius', 'mag'],
    [String.raw`A_b`, 'extinction', 'mag'],
    [String.raw`M_{\odot}`, 'absolute magnitude of the Sun in the band', 'mag'],
    [String.raw`\Upsilon`, 'mass-to-light ratio: two are stated in r, 0.6 in the near infrared', 'solar'],
    [String.raw`\nu L_\nu`, 'luminosity', 'erg/s'],
  ],
  criteria: ['absence.effectiveRadiiArcsec', 'absence.stellarMassToLight', 'absence.depthPenaltyMag'],
  columns: [
    'absoluteMagnitudeLimit',
    'luminosityLimitSolar',
    'gasToLightLowerLimit',
    'stellarMassLimits',
    'starFormationLimit',
  ],
  functions: ['photometry/limits#physicalLimit', 'photometry/star-formation#starFormationRate'],
  validity:
    'Below a thousandth of a solar mass a year star formation is stochastic: the rate is an equivalent. W3 and W4 say nothing of a dwarf poor in metals. The solar magnitude is that of the system of the band: AB and Vega differ by a factor 5 in Ks.',
  sources: ['Willmer (2018), ApJS 236, 47', 'Kennicutt & Evans (2012), ARA&A 50, 531 (NUV from memory)'],
};
