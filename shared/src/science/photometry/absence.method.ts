import type { MethodEntry } from '../method-entry.ts';

export const absence: MethodEntry = {
  id: 'absence',
  title: 'Power of silence, and absence',
  summary:
    'Nothing found is evidence only where something would have been found. The power c is the chance that the ordinary counterpart would have been seen here: covered, not masked, bright enough for its size, and inside the search.',
  formulas: [
    String.raw`c = F(r_s)\,f_{\mathrm{covered}}\,f_{\mathrm{unmasked}}\,p_{\mathrm{detected}}`,
    String.raw`m_{\mathrm{lim}}(r_e) = m_5 - 2.5 \log\sqrt{\pi r_e^2 / A_p} - 0.7526 - \text{penalty}, \quad A_p = 4\pi\,(w/2.35482)^2`,
    String.raw`\frac{P(\text{missed})}{P(\text{none})} = \frac{Q\,(1-c)}{1-Q} \text{ where nothing is found}`,
    String.raw`\text{masks: } r = 1630^{\prime\prime} \times 1.396^{-G} \text{ (stars)}, \quad 2\,r_e \text{ (galaxies)}`,
    String.raw`P(\ge n \mid n + n_{\mathrm{ring}}) = I_{1/9}(n,\, n_{\mathrm{ring}} + 1) \text{ (pieces)}`,
  ],
  symbols: [
    [String.raw`F(r_{s})`, 'share of true offsets inside the search', ''],
    [String.raw`f`, 'covered and unmasked shares of the place', ''],
    [String.raw`p_{\mathrm{detected}}`, 'chance of detection, over magnitudes and sizes', ''],
    [String.raw`m_{5}`, 'five-sigma depth for point sources', 'mag'],
    [String.raw`w`, 'seeing, full width at half maximum', 'arcsec'],
    [String.raw`r_{e}`, 'half-light radius', 'arcsec'],
    [String.raw`Q`, 'prior share with a counterpart', ''],
  ],
  criteria: [
    'absence.galaxyMaskRadii',
    'absence.piecesChance',
    'absence.darkProbability',
    'absence.noneOrMissedProbability',
    'absence.minimumPower',
    'absence.depthPenaltyMag',
    'absence.rollOffMag',
    'absence.effectiveRadiiArcsec',
    'absence.seeingFwhmArcsec',
    'absence.starMask',
  ],
  columns: ['power', 'completeness', 'depthExtended', 'masks'],
  functions: [
    'photometry/completeness#expectedDetection',
    'photometry/extended-depth#extendedLimit',
    'photometry/mask-overlap#maskedProbability',
    'photometry/star-mask#starMaskRadius',
    'photometry/faint-excess#crowdingChance',
  ],
  validity:
    'The power is the largest of the bands’, for their detections are not independent. At Q = 0.97 a power of 0.95 leaves P(missed) at 0.62: most “dark” sources would be missed galaxies; dark at 0.8 needs 0.992. Real catalogues reach less deep for extended sources than noise allows, hence the penalty. Bright stars and large galaxies in front hide; the share of the positional probability under them counts, not the area. A crowd of faint objects against the ring about the place, at the chance of the criteria, may be a galaxy in pieces: nothing is called dark there.',
  sources: [
    'depth of extended sources: background-limited noise (textbook)',
    'Shen et al. (2003), MNRAS 343, 978, sizes (coefficients from memory)',
  ],
};
