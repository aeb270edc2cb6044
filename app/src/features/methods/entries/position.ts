import type { MethodEntry } from '../method-entry.ts';

export const position: MethodEntry = {
  id: 'position',
  title: 'Position error and search radius',
  summary:
    'How far the stars may lie from the place where the gas was measured. The error along each beam axis grows with the beam and falls with the signal-to-noise; a part of the true counterparts lies in a wider tail.',
  formulas: [
    'σ_{axis} = k θ_{axis} / (S/N)',
    'C = R diag(σ_{maj}^{2}, σ_{min}^{2}) R^{T} + (σ_{sys}^{2} + σ_{opt}^{2}) I',
    'd^{2} = Δ^{T} C^{−1} Δ,   P(further away | true) = exp(−d^{2}/2)',
    'search: (1 − t) F_{core}(r) + t F_{tail}(r) = share asked for',
  ],
  symbols: [
    ['k', 'centroid factor', ''],
    ['θ', 'beam, full width at half maximum, along either axis', 'arcsec'],
    ['S/N', 'signal-to-noise of the detection', ''],
    ['C', 'covariance of the offset, one-dimensional errors', 'arcsec²'],
    ['Δ', 'offset of the object, east and north', 'arcsec'],
    ['t', 'share of offsets in the wide tail', ''],
    ['F', 'share of true offsets within r', ''],
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
  validity:
    'An error given in the table is used before the formula. Errors here are one-dimensional: a radius that holds 68.3 per cent is 1.515 of them, one that holds 95 per cent 2.448. A blend or a sidelobe can pull the centroid by a good part of a beam; that is a doubt, not in this error. The tail is used for beams over 1 arcmin only.',
  sources: ['Condon (1997), PASP 109, 166', 'Ivison et al. (2007), MNRAS 380, 199 (from memory)'],
};
