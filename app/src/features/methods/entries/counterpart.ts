import type { MethodEntry } from '../method-entry.ts';

export const counterpart: MethodEntry = {
  id: 'counterpart',
  title: 'Counterpart',
  summary:
    'Each object competes with every other, with “no stars” and with “missed”, and the probabilities add to one. Rows of different catalogues are merged into objects first; an object brings its position once, one band’s magnitude and one velocity.',
  formulas: [
    'P(none) = R (1 − Q) / S,   P(missed) = R Q (1 − c) / S,   P(object j) = R X_{j} / S',
    'S = R [(1 − Q) + Q (1 − c) + Σ_{j} X_{j}] + (1 − R)',
    'X_{j} = Q (f(Δ_{j}) / n) w_{m} B_{v}',
    'w_{m} = [q(m)/∫q] / [n(m)/n],   f(Δ) = (1 − t) N(Δ; C) + t N(Δ; C + τ^{2} I)',
  ],
  symbols: [
    ['R, Q, c', 'reliability, prior, power', ''],
    ['f(Δ)', 'density of true offsets', '1/arcsec²'],
    ['n, n(m)', 'surface density of unrelated objects, in all and per magnitude', '1/arcsec², 1/arcsec²/mag'],
    ['q(m)', 'distribution of magnitudes of true counterparts with this much gas', '1/mag'],
    ['B_{v}', 'weight of the velocity; one where there is none', ''],
    ['t, τ', 'share and width of the tail of offsets', '–; arcsec'],
  ],
  criteria: [
    'counterpart.minimumProbability',
    'counterpart.starlitProbability',
    'counterpart.dominanceRatio',
    'counterpart.learnMagnitudes',
    'counterpart.bandPreference',
  ],
  validity:
    'In a deep catalogue position alone decides nothing; the magnitude does. Stars by the tables are left out. What a person accepted or rejected is taken as said.',
  sources: ['Sutherland & Saunders (1992), MNRAS 259, 413', 'Budavári & Szalay (2008), ApJ 679, 301'],
};
