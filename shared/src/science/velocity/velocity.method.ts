import type { MethodEntry } from '../method-entry.ts';

export const velocity: MethodEntry = {
  id: 'velocity',
  title: 'Velocity',
  summary:
    'All velocities are turned to the optical convention and the barycentric frame once, at intake. An object at the velocity of the gas gains, by no more than its neighbourhood allows; one at another velocity is all but ruled out.',
  formulas: [
    String.raw`cz = c\,(f_0/f - 1), \qquad v_{\mathrm{radio}} = cz / (1 + cz/c)`,
    String.raw`\Delta v = (cz_{\mathrm{object}} - cz_{\mathrm{gas}}) / (1 + z_{\mathrm{gas}})`,
    String.raw`B_v = \epsilon + (1-\epsilon)\,\frac{N(\Delta v;\, 0, \sigma_v)}{(1-s)\,p(cz) + s\,N(\Delta v;\, 0, 200)}`,
    String.raw`\sigma_v^2 = \sigma_{\mathrm{gas}}^2 + \sigma_z^2 + \sigma_{\mathrm{int}}^2`,
  ],
  symbols: [
    [String.raw`f_{0}, f`, 'rest frequency 1420.405751768 MHz and observed frequency', 'MHz'],
    [String.raw`\Delta v`, 'velocity difference', 'km/s'],
    [String.raw`B_{v}`, 'weight of the velocity', ''],
    [
      String.raw`p, s`,
      'density of unrelated redshifts at that velocity, and the share of them that clusters',
      '1/(km/s), –',
    ],
    [String.raw`\sigma_{\mathrm{int}}`, 'scatter of stars about gas; at least a quarter of W50', 'km/s'],
  ],
  criteria: [
    'counterpart.learnVelocities',
    'counterpart.discordantKms',
    'counterpart.badRedshiftFloor',
    'counterpart.intrinsicVelocityKms',
    'counterpart.concordantClustering',
  ],
  columns: ['velocityKms'],
  functions: [
    'velocity/frames#fromBarycentric',
    'counterpart/velocity-term#velocityFactor',
    'counterpart/velocity-background#velocityHistogram',
    'counterpart/velocity-background#clusteredShare',
  ],
  validity:
    'Objects without a redshift keep a weight of one: the lack of a redshift is never evidence. Redshifts above 0.3 or below −0.01 are ignored against so near a detection. A discordant redshift keeps the share of bad redshifts, not zero. The spread of unrelated redshifts is measured from 500 or more of the run itself, the share that clusters from 200 or more in rings about the detections, and in a dense place, such as a cluster, the share within 20 arcmin is used; the notes of a run say which.',
  sources: [
    'Greisen et al. (2006), A&A 446, 747',
    'velocity weight and its floor: measured on published assignments; a starting point',
  ],
};
