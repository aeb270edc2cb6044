import type { MethodEntry } from '../method-entry.ts';

export const measures: MethodEntry = {
  id: 'measures',
  title: 'Measures of the surroundings',
  summary:
    'Beside the verdict, the measures that the literature uses, at the distance of the gas, each galaxy counted once, to 2 Mpc and 1000 km/s.',
  formulas: [
    String.raw`\Sigma_5 = \frac{5}{\pi d_5^2}, \qquad \eta_5 = \log\frac{4}{\frac{4}{3}\pi d_5^3}`,
    String.raw`\Theta_1 = \max_n \log\frac{M_n}{D_n^3} - 10.96, \qquad \Theta_5 = \log\sum_{n \le 5}\frac{M_n}{D_n^3} - 10.96`,
    String.raw`Q = \log\sum_i \frac{M_i}{M_p}\left(\frac{D_p}{d_i}\right)^3`,
    String.raw`\text{of like size: } \tfrac14 a \le a_i \le 4a, \quad \theta_i < 20\,a_i`,
    String.raw`R_{200} = \left(\frac{3M}{800\,\pi\,\rho_c}\right)^{1/3}, \qquad |\Delta v| \le 3\sigma_v`,
  ],
  symbols: [
    [String.raw`d_5`, 'projected distance of the fifth galaxy brighter than the limit', 'Mpc'],
    [
      String.raw`M_n, D_n`,
      'mass of a neighbour (stars from r at the ratio of the criteria, and gas with helium where measured), projected distance',
      'M☉, Mpc',
    ],
    [String.raw`M_p, D_p`, 'gas and stars of the detection, diameter of its gas', 'M☉, kpc'],
    [
      String.raw`a, a_i`,
      'diameter of the detection (gas over 1.7) and of the neighbour (four half-light radii)',
      'arcsec',
    ],
    [String.raw`\sigma_v`, 'velocity dispersion of the group', 'km/s'],
  ],
  criteria: ['counterpart.massToLightR', 'surroundings.faintestNeighbourMag', 'surroundings.clusterRadiusMpc'],
  columns: ['measures'],
  functions: [
    'surroundings/density-measures#projectedDensity',
    'surroundings/density-measures#localDensity',
    'surroundings/density-measures#tidalIndex',
    'surroundings/density-measures#tidalStrength',
    'surroundings/density-measures#spoilsIsolation',
    'surroundings/group-membership#r200Kpc',
  ],
  validity:
    'With projected distances the tidal index is an upper bound. Isolated: index below 0, Q below -2, local density below 2.4 (from memory). With fewer than five galaxies the densities are upper limits. A nearest neighbour beyond the edge of the redshifts is a lower limit. Fibres miss close pairs: bright galaxies without a redshift within two beams are counted apart.',
  sources: [
    'Karachentsev & Makarov (1999); Karachentsev et al. (2013), AJ 145, 101 (constant from memory)',
    'Verley et al. (2007), A&A 472, 121',
    'Karachentseva (1973)',
  ],
};
