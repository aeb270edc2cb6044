import type { MethodEntry } from '../method-entry.ts';

export const counterpart: MethodEntry = {
  id: 'counterpart',
  title: 'Counterpart',
  summary:
    'Each object competes with every other, with “no stars” and with “missed”, and the probabilities add to one. Rows of different catalogues are merged into objects first; an object brings its position once, one band’s magnitude and one velocity.',
  formulas: [
    String.raw`P(\text{none}) = \frac{R\,(1-Q)}{S}, \quad P(\text{missed}) = \frac{R\,Q\,(1-c)}{S}, \quad P(\text{object } j) = \frac{R\,X_j}{S}`,
    String.raw`S = R\,\Big[(1-Q) + Q\,(1-c) + \sum_j X_j\Big] + (1-R)`,
    String.raw`X_j = Q\,\frac{f(\Delta_j)}{n}\,w_m\,B_v, \qquad w_m = \frac{q(m)/\!\int\! q}{n(m)/n}`,
    String.raw`f(\Delta) = (1-t)\,N(\Delta;\, C) + t\,N(\Delta;\, C + \tau^2 I)`,
    String.raw`P(\text{all}) \propto \prod_i P_i(j_i), \qquad j_i \ne j_k \text{ for } i \ne k`,
  ],
  symbols: [
    [String.raw`R, Q, c`, 'reliability, prior, power', ''],
    [String.raw`f(\Delta)`, 'density of true offsets', '1/arcsec²'],
    [String.raw`n, n(m)`, 'surface density of unrelated objects, in all and per magnitude', '1/arcsec², 1/arcsec²/mag'],
    [String.raw`q(m)`, 'distribution of magnitudes of true counterparts with this much gas', '1/mag'],
    [String.raw`B_{v}`, 'weight of the velocity; one where there is none', ''],
    [String.raw`t, \tau`, 'share and width of the tail of offsets', '–; arcsec'],
  ],
  criteria: [
    'counterpart.minimumProbability',
    'counterpart.starlitProbability',
    'counterpart.dominanceRatio',
    'counterpart.learnMagnitudes',
    'counterpart.bandPreference',
  ],
  columns: ['starlight', 'pNone', 'pMissed', 'counterpart', 'claims'],
  functions: [
    'counterpart/exclusive#exclusiveProbabilities',
    'counterpart/magnitude-term#countMagnitudes',
    'counterpart/merge-objects#mergeIntoObjects',
    'counterpart/joint-claims#jointClaimFactors',
    'counterpart/starlight#starlightVerdict',
  ],
  validity:
    'In a deep catalogue position alone decides nothing; the magnitude does. Stars by the tables are left out. What a person accepted or rejected is taken as said. Where several detections claim one galaxy, all assignments that use no galaxy twice are summed; who loses its galaxy so is contested, not dark. The counts of unrelated objects leave out the counterparts to be expected of the detections themselves.',
  sources: ['Sutherland & Saunders (1992), MNRAS 259, 413', 'Budavári & Szalay (2008), ApJ 679, 301'],
};
