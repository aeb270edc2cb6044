import type { MethodEntry } from '../method-entry.ts';

export const surroundings: MethodEntry = {
  id: 'surroundings',
  title: 'Surroundings',
  summary:
    'P(no neighbour) has three factors: that none is known in the window, whatever the distance within its error; that none was missed by the redshift survey; that the circle is covered.',
  formulas: [
    String.raw`R = D_A\,\theta \le R_{\max}, \qquad |\Delta v| \le \Delta v_{\max}`,
    String.raw`P = \big\langle [\text{none known}]\;e^{-N_{\mathrm{missed}}} \big\rangle_{\text{draws of } D} \times f_{\mathrm{covered}}`,
    String.raw`N_{\mathrm{missed}} = [\,n({<}M_{\mathrm{faint}}) - n({<}M_{\mathrm{lim}})\,]\,V, \qquad n({<}M) = \varphi^* \,\Gamma\big(\alpha+1,\; 10^{-0.4\,(M-M^*)}\big)`,
  ],
  symbols: [
    [String.raw`R`, 'projected separation at the distance of the gas', 'kpc'],
    [String.raw`\Delta v`, 'velocity difference', 'km/s'],
    [String.raw`M_{\mathrm{faint}}`, 'faintest neighbour that counts', 'mag'],
    [String.raw`M_{\mathrm{lim}}`, 'what the redshift survey reaches at that distance', 'mag'],
    [String.raw`V`, 'volume of the window, π R² × 2 Δv / H₀ at their limits', 'Mpc³'],
    [String.raw`\varphi^{*}, M^{*}, \alpha`, 'luminosity function', 'h³ Mpc⁻³, mag, –'],
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
  columns: ['surroundings', 'pAlone', 'nearest', 'count1Mpc500Kms', 'aloneFactors'],
  functions: [
    'surroundings/alone-probability#aloneProbability',
    'surroundings/missed-neighbours#missedNeighbours',
    'surroundings/surroundings-verdict#surroundingsVerdict',
    'surroundings/group-membership#isMember',
  ],
  validity:
    'The mean field is the lower bracket of what is missed; with clustering it is several times more, and both are said. Without a usable distance nothing is called alone, but a neighbour, a group or a cluster with a distance of its own still counts. Redshift surveys lose close pairs.',
  sources: ['Blanton et al. (2003), ApJ 592, 819 (α from memory)', 'Argudo-Fernández et al. (2015) (from memory)'],
};
