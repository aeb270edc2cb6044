/** A work that the method stands on, as a journal's reference list needs it. */
export interface Reference {
  authors: string;
  year: number;
  title: string;
  journal: string;
  volume: string;
  page: string;
  /** As in running text, without the year. */
  short: string;
}

const work = (
  short: string,
  authors: string,
  year: number,
  title: string,
  journal: string,
  volume: string,
  page: string,
): Reference => ({ short, authors, year, title, journal, volume, page });

/** By BibTeX key. Journals by the macros of AASTeX where it has one. */
export const REFERENCES = {
  vincenty1975: work(
    'Vincenty',
    'Vincenty, T.',
    1975,
    'Direct and Inverse Solutions of Geodesics on the Ellipsoid with Application of Nested Equations',
    'Survey Review',
    '23',
    '88',
  ),
  condon1997: work('Condon', 'Condon, J. J.', 1997, 'Errors in Elliptical Gaussian Fits', '\\pasp', '109', '166'),
  ivison2007: work(
    'Ivison et al.',
    'Ivison, R. J. and others',
    2007,
    'The SCUBA HAlf Degree Extragalactic Survey - III. Identification of radio and mid-infrared counterparts to submillimetre galaxies',
    '\\mnras',
    '380',
    '199',
  ),
  mould2000: work(
    'Mould et al.',
    'Mould, J. R. and others',
    2000,
    'The Hubble Space Telescope Key Project on the Extragalactic Distance Scale. XXVIII. Combining the Constraints on the Hubble Constant',
    '\\apj',
    '529',
    '786',
  ),
  karachentsev1996: work(
    'Karachentsev & Makarov',
    'Karachentsev, I. D. and Makarov, D. A.',
    1996,
    'The Galaxy Motion Relative to Nearby Galaxies and the Local Velocity Field',
    '\\aj',
    '111',
    '794',
  ),
  yahil1977: work(
    'Yahil et al.',
    'Yahil, A. and Tammann, G. A. and Sandage, A.',
    1977,
    'The Local Group: the solar motion relative to its centroid',
    '\\apj',
    '217',
    '903',
  ),
  meyer2017: work(
    'Meyer et al.',
    'Meyer, M. and others',
    2017,
    'Tracing HI Beyond the Local Universe',
    '\\pasa',
    '34',
    'e052',
  ),
  sutherland1992: work(
    'Sutherland & Saunders',
    'Sutherland, W. and Saunders, W.',
    1992,
    'On the likelihood ratio for source identification',
    '\\mnras',
    '259',
    '413',
  ),
  budavari2008: work(
    'Budavári & Szalay',
    "Budav{\\'a}ri, T. and Szalay, A. S.",
    2008,
    'Probabilistic Cross-Identification of Astronomical Sources',
    '\\apj',
    '679',
    '301',
  ),
  downes1986: work(
    'Downes et al.',
    'Downes, A. J. B. and Peacock, J. A. and Savage, A. and Carrie, D. R.',
    1986,
    'The Parkes selected regions: powerful radio galaxies and quasars at high redshifts',
    '\\mnras',
    '218',
    '31',
  ),
  graham2005: work(
    'Graham & Driver',
    'Graham, A. W. and Driver, S. P.',
    2005,
    "A Concise Reference to (Projected) S{\\'e}rsic R$^{1/n}$ Quantities, Including Concentration, Profile Slopes, Petrosian Indices, and Kron Magnitudes",
    '\\pasa',
    '22',
    '118',
  ),
  blanton2003: work(
    'Blanton et al.',
    'Blanton, M. R. and others',
    2003,
    'The Galaxy Luminosity Function and Luminosity Density at Redshift z = 0.1',
    '\\apj',
    '592',
    '819',
  ),
  willmer2018: work(
    'Willmer',
    'Willmer, C. N. A.',
    2018,
    'The Absolute Magnitude of the Sun in Several Filters',
    '\\apjs',
    '236',
    '47',
  ),
  schlafly2011: work(
    'Schlafly & Finkbeiner',
    'Schlafly, E. F. and Finkbeiner, D. P.',
    2011,
    'Measuring Reddening with Sloan Digital Sky Survey Stellar Spectra and Recalibrating SFD',
    '\\apj',
    '737',
    '103',
  ),
  wilson1927: work(
    'Wilson',
    'Wilson, E. B.',
    1927,
    'Probable Inference, the Law of Succession, and Statistical Inference',
    'Journal of the American Statistical Association',
    '22',
    '209',
  ),
  gehrels1986: work(
    'Gehrels',
    'Gehrels, N.',
    1986,
    'Confidence Limits for Small Numbers of Events in Astrophysical Data',
    '\\apj',
    '303',
    '336',
  ),
  wakker1991: work(
    'Wakker',
    'Wakker, B. P.',
    1991,
    'Distribution and origin of high-velocity clouds. II. Statistical analysis of the whole-sky survey',
    '\\aap',
    '250',
    '499',
  ),
} as const satisfies Record<string, Reference>;
export type ReferenceKey = keyof typeof REFERENCES;

/** The works in BibTeX, in the order of their keys. */
export function bibtexOf(keys: Iterable<ReferenceKey>): string {
  return [...new Set(keys)]
    .sort()
    .map((key) => {
      const { authors, year, title, journal, volume, page } = REFERENCES[key];
      const fields = { author: authors, title: `{${title}}`, journal, year: String(year), volume, pages: page };
      const lines = Object.entries(fields).map(([name, value]) => `  ${name.padEnd(7)} = {${value}}`);
      return `@article{${key},\n${lines.join(',\n')}\n}\n`;
    })
    .join('\n');
}
