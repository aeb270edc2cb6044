import type { MethodEntry } from '../method-entry.ts';

export const distance: MethodEntry = {
  id: 'distance',
  title: 'Distance',
  summary:
    'A measured distance where there is one, else the flow model if the criteria choose it, else the Hubble law, else none. Everything in kpc and solar masses rests on it; ratios of gas to light do not.',
  formulas: [
    String.raw`D_C = \frac{c}{H_0} \int_0^z \frac{dz^\prime}{\sqrt{\Omega_m (1+z^\prime)^3 + 1 - \Omega_m}}`,
    String.raw`D_L = (1+z_{\mathrm{observed}})\,D_C, \qquad D_A = D_L / (1+z_{\mathrm{observed}})^2`,
    String.raw`\sigma_D^2 = (\sigma_{\mathrm{pec}}/H_0)^2 + (\sigma_{cz}/H_0)^2`,
    String.raw`v_{\mathrm{flow}} = v_{\mathrm{LG}} + \sum_a v_a \left[\cos\theta_a + \frac{v_{\mathrm{LG}} - V_a\cos\theta_a}{r_a}\left(\frac{r_a}{V_a}\right)^{1-\gamma}\right], \quad \gamma = 2`,
  ],
  symbols: [
    [String.raw`H_{0}, \Omega_{m}`, 'cosmology of the survey (flat)', 'km/s/Mpc; –'],
    [String.raw`z`, 'redshift in the frame of the Hubble law, or of the flow model', ''],
    [String.raw`D_{L}, D_{A}`, 'luminosity distance (masses) and angular-diameter distance (projection)', 'Mpc'],
    [String.raw`\sigma_{\mathrm{pec}}`, 'scatter of peculiar velocities', 'km/s'],
    [String.raw`S`, 'HI flux, integrated over optical velocity', 'Jy km/s'],
    [String.raw`M_{\mathrm{HI}}`, 'gas mass, optically thin', 'M☉'],
  ],
  criteria: [
    'distance.flowModel',
    'distance.hubbleFrame',
    'distance.minimumVelocityKms',
    'distance.warnVelocityKms',
    'distance.peculiarVelocityKms',
    'distance.clusterPeculiarVelocityKms',
  ],
  columns: ['distanceMpc', 'distanceErrorMpc'],
  functions: [
    'distance/distance-rule#chooseDistance',
    'distance/flow-model#flowVelocity',
    'distance/distance-branches#distanceBranches',
    'distance/cosmology#luminosityDistance',
  ],
  validity:
    'A redshift gives no distance below the slowest usable velocity and a poor one near clusters: 200 km/s of peculiar velocity are 29 per cent at 10 Mpc and 3 per cent at 100 Mpc for H₀ = 70. The error of H₀ itself is common to all and left out.',
  sources: [
    'Hogg (1999), arXiv:astro-ph/9905116',
    'Mould et al. (2000), ApJ 529, 786, appendix',
    'Karachentsev & Makarov (1996), AJ 111, 794',
    'Meyer et al. (2017), PASA 34, e052',
  ],
};
