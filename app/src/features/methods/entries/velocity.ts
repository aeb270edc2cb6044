import type { MethodEntry } from '../method-entry.ts';

export const velocity: MethodEntry = {
  id: 'velocity',
  title: 'Velocity',
  summary:
    'All velocities are turned to the optical convention and the barycentric frame once, at intake. An object at the velocity of the gas gains, by no more than its neighbourhood allows; one at another velocity is all but ruled out.',
  formulas: [
    'cz = c (f_{0}/f − 1),   v_{radio} = cz / (1 + cz/c)',
    'Δv = (cz_{object} − cz_{gas}) / (1 + z_{gas})',
    'B_{v} = N(Δv; 0, σ_{v}) / p_{chance}',
    'σ_{v}^{2} = σ_{gas}^{2} + σ_{z}^{2} + σ_{int}^{2}',
  ],
  symbols: [
    ['f_{0}, f', 'rest frequency 1420.405751768 MHz and observed frequency', 'MHz'],
    ['Δv', 'velocity difference', 'km/s'],
    ['B_{v}', 'weight of the velocity', ''],
    ['p_{chance}', 'density of unrelated redshifts at that velocity, with a clustered part', '1/(km/s)'],
    ['σ_{int}', 'scatter of stars about gas; at least a quarter of W50', 'km/s'],
  ],
  criteria: [
    'counterpart.discordantKms',
    'counterpart.badRedshiftFloor',
    'counterpart.intrinsicVelocityKms',
    'counterpart.concordantClustering',
  ],
  validity:
    'Objects without a redshift keep a weight of one: the lack of a redshift is never evidence. Redshifts above 0.3 or below −0.01 are ignored against so near a detection. A discordant redshift keeps the share of bad redshifts, not zero.',
  sources: [
    'Greisen et al. (2006), A&A 446, 747',
    'velocity weight and its floor: measured on published assignments; a starting point',
  ],
};
