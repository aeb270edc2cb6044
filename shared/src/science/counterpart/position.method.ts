import type { MethodEntry } from '../method-entry.ts';

export const position: MethodEntry = {
  id: 'position',
  title: 'Position error and search radius',
  summary:
    'How far the stars may lie from the place where the gas was measured. The error along each beam axis grows with the beam and falls with the signal-to-noise; a part of the true counterparts lies in a wider tail.',
  formulas: [
    String.raw`\sigma_{\mathrm{axis}} = k\,\theta_{\mathrm{axis}} / (\mathrm{S/N})`,
    String.raw`C = R\,\mathrm{diag}(\sigma_{\mathrm{maj}}^2, \sigma_{\mathrm{min}}^2)\,R^{T} + (\sigma_{\mathrm{sys}}^2 + \sigma_{\mathrm{opt}}^2)\,I`,
    String.raw`d^2 = \Delta^{T} C^{-1} \Delta, \qquad P(\text{further away} \mid \text{true}) = e^{-d^2/2}`,
    String.raw`(1-t)\,F_{\mathrm{core}}(r) + t\,F_{\mathrm{tail}}(r) = \text{share asked for}`,
  ],
  symbols: [
    [String.raw`k`, 'centroid factor', ''],
    [String.raw`\theta`, 'beam, full width at half maximum, along either axis', 'arcsec'],
    [String.raw`\mathrm{S/N}`, 'signal-to-noise of the detection', ''],
    [String.raw`C`, 'covariance of the offset, one-dimensional errors', 'arcsec²'],
    [String.raw`\Delta`, 'offset of the object, east and north', 'arcsec'],
    [String.raw`t`, 'share of offsets in the wide tail', ''],
    [String.raw`F`, 'share of true offsets within r', ''],
  ],
  criteria: [
    'position.centroidFactor',
    'position.systematicArcsec',
    'position.opticalErrorArcsec',
    'position.defaultErrorArcsec',
    'position.searchProbability',
    'position.tailFraction',
    'position.tailArcsec',
    'position.halfBeamFloor',
    'position.searchRadiusArcsec',
  ],
  columns: ['positionError', 'searchRadiusArcsec'],
  functions: [
    'counterpart/position-error#centroidError',
    'counterpart/position-error#mahalanobisSquared',
    'counterpart/search-radius#radiusHolding',
    'counterpart/search-radius#shareInside',
  ],
  validity:
    'An error given in the table is used before the formula. Errors here are one-dimensional: a radius that holds 68.3 per cent is 1.515 of them, one that holds 95 per cent 2.448. A blend or a sidelobe can pull the centroid by a good part of a beam; that is a doubt, not in this error. The tail is used for beams over 1 arcmin only.',
  sources: ['Condon (1997), PASP 109, 166', 'Ivison et al. (2007), MNRAS 380, 199 (from memory)'],
};
