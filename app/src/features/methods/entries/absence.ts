import type { MethodEntry } from '../method-entry.ts';

export const absence: MethodEntry = {
  id: 'absence',
  title: 'Power of silence, and absence',
  summary:
    'Nothing found is evidence only where something would have been found. The power c is the chance that the ordinary counterpart would have been seen here: covered, not masked, bright enough for its size, and inside the search.',
  formulas: [
    'c = F(r_{s}) f_{covered} f_{unmasked} p_{detected}',
    'm_{lim}(r_{e}) = m_{5} − 2.5 log √(π r_{e}^{2} / A_{p}) − 0.7526 − penalty,   A_{p} = 4π (w/2.35482)^{2}',
    'nothing found: P(missed) / P(none) = Q (1 − c) / (1 − Q)',
  ],
  symbols: [
    ['F(r_{s})', 'share of true offsets inside the search', ''],
    ['f', 'covered and unmasked shares of the place', ''],
    ['p_{detected}', 'chance of detection, over magnitudes and sizes', ''],
    ['m_{5}', 'five-sigma depth for point sources', 'mag'],
    ['w', 'seeing, full width at half maximum', 'arcsec'],
    ['r_{e}', 'half-light radius', 'arcsec'],
    ['Q', 'prior share with a counterpart', ''],
  ],
  criteria: [
    'absence.darkProbability',
    'absence.noneOrMissedProbability',
    'absence.minimumPower',
    'absence.depthPenaltyMag',
    'absence.rollOffMag',
    'absence.effectiveRadiiArcsec',
    'absence.seeingFwhmArcsec',
    'absence.starMask',
  ],
  validity:
    'The power is the largest of the bands’, for their detections are not independent. At Q = 0.97 a power of 0.95 leaves P(missed) at 0.62: most “dark” sources would be missed galaxies; dark at 0.8 needs 0.992. Real catalogues reach less deep for extended sources than noise allows, hence the penalty.',
  sources: [
    'depth of extended sources: background-limited noise (textbook)',
    'Shen et al. (2003), MNRAS 343, 978, sizes (coefficients from memory)',
  ],
};
