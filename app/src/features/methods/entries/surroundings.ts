import type { MethodEntry } from '../method-entry.ts';

export const surroundings: MethodEntry = {
  id: 'surroundings',
  title: 'Surroundings',
  summary:
    'P(no neighbour) has three factors: that none is known in the window, whatever the distance within its error; that none was missed by the redshift survey; that the circle is covered.',
  formulas: [
    'R = D_{A} θ ≤ R_{max},   |Δv| ≤ Δv_{max}',
    'P = ⟨[none known] exp(−N_{missed})⟩_{draws of D} × f_{covered}',
    'N_{missed} = [n(<M_{faint}) − n(<M_{lim})] V,   n(<M) = φ^{*} Γ(α + 1, 10^{−0.4 (M − M^{*})})',
  ],
  symbols: [
    ['R', 'projected separation at the distance of the gas', 'kpc'],
    ['Δv', 'velocity difference', 'km/s'],
    ['M_{faint}', 'faintest neighbour that counts', 'mag'],
    ['M_{lim}', 'what the redshift survey reaches at that distance', 'mag'],
    ['V', 'volume of the window: π R_{max}^{2} × 2 Δv_{max}/H_{0}', 'Mpc³'],
    ['φ^{*}, M^{*}, α', 'luminosity function', 'h³ Mpc^{−3}, mag, –'],
  ],
  criteria: [
    'surroundings.radiusMpc',
    'surroundings.velocityWindowKms',
    'surroundings.faintestNeighbourMag',
    'surroundings.aloneProbability',
    'surroundings.minimumCovered',
    'surroundings.schechterPhiStarH3',
    'surroundings.schechterMStarH',
    'surroundings.schechterAlpha',
    'surroundings.clusterRadiusMpc',
  ],
  validity:
    'The mean field is the lower bracket of what is missed; with clustering it is several times more, and both are said. Without a usable distance nothing is called alone, but a neighbour, a group or a cluster with a distance of its own still counts. Redshift surveys lose close pairs.',
  sources: ['Blanton et al. (2003), ApJ 592, 819 (α from memory)', 'Argudo-Fernández et al. (2015) (from memory)'],
};
