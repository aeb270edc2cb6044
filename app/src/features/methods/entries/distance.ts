import type { MethodEntry } from '../method-entry.ts';

export const distance: MethodEntry = {
  id: 'distance',
  title: 'Distance',
  summary:
    'A measured distance where there is one, else the flow model if the criteria choose it, else the Hubble law, else none. Everything in kpc and solar masses rests on it; ratios of gas to light do not.',
  formulas: [
    'D_{C} = (c/H_{0}) ∫_{0}^{z} dz′ / √(Ω_{m}(1+z′)^{3} + 1 − Ω_{m})',
    'D_{L} = (1 + z_{observed}) D_{C},   D_{A} = D_{L} / (1 + z_{observed})^{2}',
    'σ_{D}^{2} = (σ_{pec}/H_{0})^{2} + (σ_{cz}/H_{0})^{2}',
    'M_{HI} = 2.356 × 10^{5} D_{L}^{2} S / (1+z)^{2}',
  ],
  symbols: [
    ['H_{0}, Ω_{m}', 'cosmology of the survey (flat)', 'km/s/Mpc; –'],
    ['z', 'redshift in the frame of the Hubble law, or of the flow model', ''],
    ['D_{L}, D_{A}', 'luminosity distance (masses) and angular-diameter distance (projection)', 'Mpc'],
    ['σ_{pec}', 'scatter of peculiar velocities', 'km/s'],
    ['S', 'HI flux, integrated over optical velocity', 'Jy km/s'],
    ['M_{HI}', 'gas mass, optically thin', 'M☉'],
  ],
  criteria: [
    'distance.flowModel',
    'distance.hubbleFrame',
    'distance.minimumVelocityKms',
    'distance.warnVelocityKms',
    'distance.peculiarVelocityKms',
    'distance.clusterPeculiarVelocityKms',
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
