import type { MethodEntry } from '../method-entry.ts';

export const doubts: MethodEntry = {
  id: 'doubts',
  title: 'Doubts',
  summary:
    'What else could make the signal, each tested by a rule with its number: clear, watch, serious, or not testable here.',
  formulas: [
    String.raw`v_{\mathrm{dev}} = v_{\mathrm{LSR}} - v_{\max} \text{ or } v_{\mathrm{LSR}} - v_{\min}, \qquad v(d) = \left(\frac{\Theta}{R} - \frac{\Theta_0}{R_0}\right) R_0 \sin l \cos b`,
    String.raw`z_{\mathrm{OH}} = \frac{1667.359}{1420.406}\,(1 + z_{\mathrm{HI}}) - 1`,
    String.raw`\text{debris: } D_n\,\theta \le 250\ (500)\ \mathrm{kpc}, \quad |\Delta v| \le 300\ (500)\ \mathrm{km/s}`,
    String.raw`N_{\mathrm{blend}} = n({>}M)\,\Big[V + \int \xi\,dV\Big]`,
  ],
  symbols: [
    [String.raw`v_{\mathrm{dev}}`, 'deviation from what a rotating disc allows along the line of sight', 'km/s'],
    [String.raw`\Theta_0, R_0`, '220 km/s and 8.5 kpc; disc to 20 kpc and 5 kpc of height', 'km/s, kpc'],
    [String.raw`z_{\mathrm{OH}}`, 'redshift if the line is hydroxyl', ''],
    [String.raw`D_n`, 'distance of the neighbour', 'Mpc'],
    [String.raw`\xi`, 'correlation function of HI galaxies', ''],
  ],
  criteria: [
    'doubts.minimumReliability',
    'doubts.strongDebrisKpc',
    'doubts.strongDebrisKms',
    'doubts.possibleDebrisKpc',
    'doubts.possibleDebrisKms',
    'doubts.debrisGasMass',
    'doubts.debrisStellarMass',
    'doubts.cloudVelocityKms',
    'doubts.deviationVelocityKms',
    'doubts.interference',
  ],
  columns: ['doubts'],
  functions: [
    'doubts/cloud#cloud',
    'doubts/deviation-velocity#deviationVelocity',
    'doubts/debris#debris',
    'doubts/hydroxyl#hydroxyl',
    'doubts/recombination-line#recombinationLine',
    'doubts/interference#interference',
    'doubts/blend#blend',
    'doubts/sidelobe#sidelobe',
    'doubts/continuum#continuum',
    'doubts/edge#edge',
  ],
  validity:
    'A doubt qualifies a verdict, it does not change it. Beside a galaxy at the velocity of the gas a cloud is a watch at most and debris is clear. Frequencies are barycentric here; interference is at rest in the observatory, up to 30 km/s off.',
  sources: [
    'Wakker (1991), A&A 250, 499',
    'Suess et al. (2016), MNRAS 459, 220',
    'Jones et al. (2015), MNRAS 449, 1856',
    'Duc & Bournaud (2008), ApJ 673, 787',
  ],
};
