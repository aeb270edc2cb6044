import { z } from 'zod';

interface KeyFacts {
  title: string;
  unit: string;
  /** What it does, in a sentence. */
  description: string;
  /** Where the default comes from. */
  source: string;
  /** Words of the values of an enum, for people; the values themselves are what is kept and sent. */
  choices?: Record<string, string>;
}
const key = <T extends z.ZodType>(schema: T, facts: KeyFacts): T => schema.meta({ ...facts }) as T;
const PRACTICE = 'common practice';
const OWN = 'choice of this project; a setting';

const distance = z.strictObject({
  flowModel: key(z.enum(['none', 'mould2000']).default('none'), {
    title: 'Flow model',
    unit: '',
    description: 'Corrects redshift distances for infall before the Hubble law is used.',
    source: 'Mould et al. (2000), ApJ 529, 786, appendix',
    choices: {
      none: 'No correction for infall',
      mould2000: 'Infall to Virgo, the Great Attractor and Shapley (Mould 2000)',
    },
  }),
  hubbleFrame: key(z.enum(['km96', 'yts77', 'cmb']).default('km96'), {
    title: 'Frame of the Hubble law',
    unit: '',
    description: 'Local Group vector (two published ones) or the microwave background.',
    source: 'Karachentsev & Makarov (1996), AJ 111, 794',
    choices: {
      km96: 'Local Group (Karachentsev & Makarov 1996)',
      yts77: 'Local Group (Yahil, Tammann & Sandage 1977)',
      cmb: 'Microwave background',
    },
  }),
  minimumVelocityKms: key(z.number().min(0).max(5000).default(500), {
    title: 'Slowest usable velocity',
    unit: 'km/s',
    description: 'Below this velocity in the Local Group frame a redshift gives no distance.',
    source: PRACTICE,
  }),
  warnVelocityKms: key(z.number().min(0).max(10_000).default(1500), {
    title: 'Velocity below which to warn',
    unit: 'km/s',
    description: 'Redshift distances below it carry a caution.',
    source: PRACTICE,
  }),
  peculiarVelocityKms: key(z.number().min(0).max(2000).default(200), {
    title: 'Peculiar velocity, field',
    unit: 'km/s',
    description: 'One-dimensional scatter about the flow; sets the floor of the distance error.',
    source: PRACTICE,
  }),
  clusterPeculiarVelocityKms: key(z.number().min(0).max(3000).default(500), {
    title: 'Peculiar velocity, near a cluster',
    unit: 'km/s',
    description: 'In place of the field value inside a flow-model cluster cone.',
    source: PRACTICE,
  }),
});

const position = z.strictObject({
  searchRadiusArcsec: key(z.number().positive().max(36_000).nullable().default(null), {
    title: 'Fixed search radius',
    unit: 'arcsec',
    description: 'In place of the error ellipse; empty uses the ellipse.',
    source: OWN,
  }),
  searchProbability: key(z.number().min(0.5).max(0.9999).default(0.997), {
    title: 'Share of true offsets inside the search',
    unit: '',
    description: 'The search holds this share of the offset mixture (core and tail).',
    source: PRACTICE,
  }),
  centroidFactor: key(z.number().min(0.1).max(3).default(0.6), {
    title: 'Centroid factor',
    unit: 'FWHM/(S/N)',
    description: 'One-dimensional centroid error = factor x beam FWHM / S/N, on each beam axis.',
    source: 'Ivison et al. (2007), MNRAS 380, 199 (from memory)',
  }),
  systematicArcsec: key(z.number().min(0).max(3600).nullable().default(null), {
    title: 'Systematic position error',
    unit: 'arcsec',
    description:
      'One-dimensional; empty goes by the beam: 2 for a beam up to 1 arcmin, 10 up to 4 arcmin, 60 beyond 10 arcmin, between them in proportion.',
    source: PRACTICE,
  }),
  opticalErrorArcsec: key(z.number().min(0).max(60).default(0.2), {
    title: 'Catalogue position error',
    unit: 'arcsec',
    description: 'One-dimensional, where a catalogue states none.',
    source: PRACTICE,
  }),
  defaultErrorArcsec: key(z.number().positive().max(3600).default(20), {
    title: 'HI position error when nothing is known',
    unit: 'arcsec',
    description:
      'One-dimensional; used where a detection has neither an error nor a beam and S/N. Said so in the grounds.',
    source: OWN,
  }),
  tailFraction: key(z.number().min(0).max(0.5).default(0.12), {
    title: 'Share of offsets in the wide tail',
    unit: '',
    description: 'True counterparts whose offset is drawn from the wide component.',
    source: 'measured on published assignments; a starting point',
  }),
  tailArcsec: key(z.number().min(0).max(600).default(28), {
    title: 'Width of the tail',
    unit: 'arcsec',
    description: 'Added in quadrature to the one-dimensional error for the tail; only for beams over 1 arcmin.',
    source: 'measured on published assignments; a starting point',
  }),
  halfBeamFloor: key(z.boolean().default(true), {
    title: 'Search at least half a beam',
    unit: '',
    description: 'For a single dish (beam over 1 arcmin) the search never falls below half a beam.',
    source: PRACTICE,
  }),
});

const counterpart = z.strictObject({
  minimumProbability: key(z.number().min(0.05).max(1).default(0.5), {
    title: 'Least probability of a counterpart',
    unit: '',
    description: 'An object below it never makes a detection starlit; objects together above it make it contested.',
    source: OWN,
  }),
  starlitProbability: key(z.number().min(0.5).max(1).default(0.9), {
    title: 'Dominating probability',
    unit: '',
    description: 'An object at or above it makes the detection starlit by itself.',
    source: OWN,
  }),
  dominanceRatio: key(z.number().min(1).max(1000).default(5), {
    title: 'Lead over the next object',
    unit: 'times',
    description: 'Below the dominating probability an object must lead the next by this factor.',
    source: OWN,
  }),
  priorFraction: key(z.number().min(0.5).max(0.9999).default(0.97), {
    title: 'Prior share with a counterpart',
    unit: '',
    description: 'Q: how many HI detections have a galaxy of stars, before looking.',
    source: "Published base rates of 1 to 3 per cent without; WALLABY pilot (O'Beirne et al. 2025), ALFALFA",
  }),
  learnPrior: key(z.boolean().default(true), {
    title: 'Learn the prior per mass',
    unit: '',
    description: 'Where the survey has enough detections, Q is learnt per bin of HI mass.',
    source: 'expectation maximisation over the run',
  }),
  priorWithoutDistance: key(z.number().min(0.01).max(0.999).default(0.1), {
    title: 'Prior without a usable distance',
    unit: '',
    description: 'Q for clouds of low velocity without a distance.',
    source: 'measured on published assignments; a starting point',
  }),
  relationSlope: key(z.number().min(0.1).max(3).default(1.1), {
    title: 'Gas-to-stars slope',
    unit: 'dex/dex',
    description: 'log M* = intercept + slope (log M_HI - 9.5).',
    source: 'direct fit on published assignments; a starting point',
  }),
  relationIntercept: key(z.number().min(6).max(12).default(9), {
    title: 'Gas-to-stars intercept',
    unit: 'dex',
    description: 'log M* in solar masses at log M_HI = 9.5.',
    source: 'direct fit on published assignments; a starting point',
  }),
  relationScatterMag: key(z.number().min(0.1).max(5).default(1.3), {
    title: 'Scatter of the relation',
    unit: 'mag',
    description: 'At log M_HI = 9.5; grows to lower masses, clipped to 0.7-2.5 mag.',
    source: 'direct fit on published assignments; a starting point',
  }),
  relationTail: key(z.number().min(0).max(0.5).default(0.05), {
    title: 'Wide tail of the relation',
    unit: '',
    description: 'Share of ordinary galaxies far off the relation.',
    source: 'direct fit on published assignments; a starting point',
  }),
  massToLightR: key(z.number().min(0.05).max(10).default(0.75), {
    title: 'Stellar mass-to-light ratio in r',
    unit: 'solar',
    description: 'Turns stellar mass into light for the expected counterpart.',
    source: PRACTICE,
  }),
  learnMagnitudes: key(z.boolean().default(true), {
    title: 'Learn the magnitude term',
    unit: '',
    description: 'With 200 secure counterparts or more the line and its scatter are refitted on them.',
    source: 'Sutherland & Saunders (1992), MNRAS 259, 413',
  }),
  bandPreference: key(
    z
      .array(z.string().max(20))
      .min(1)
      .max(40)
      .default(['r', 'g', 'i', 'V', 'B', 'z', 'G', 'J', 'H', 'Ks', 'W1', 'W2', 'NUV', 'FUV']),
    {
      title: 'Bands, best first',
      unit: '',
      description: 'The magnitude weight of an object comes from the first of these it has.',
      source: OWN,
    },
  ),
  discordantKms: key(z.number().min(50).max(5000).default(500), {
    title: 'Discordant velocity',
    unit: 'km/s',
    description: 'A reliable redshift further off than this rules an object out but for bad redshifts.',
    source: PRACTICE,
  }),
  badRedshiftFloor: key(z.number().min(0).max(0.2).default(0.005), {
    title: 'Share of bad redshifts',
    unit: '',
    description: 'What remains of a candidate whose redshift disagrees.',
    source: 'measured on published assignments; a starting point',
  }),
  intrinsicVelocityKms: key(z.number().min(0).max(500).default(30), {
    title: 'Gas-star velocity scatter',
    unit: 'km/s',
    description: 'Added in quadrature to the velocity errors; at least a quarter of W50.',
    source: PRACTICE,
  }),
  concordantClustering: key(z.number().min(0).max(1).default(0.33), {
    title: 'Concordant by clustering',
    unit: '',
    description:
      'Share of unrelated redshift objects near a detection that are at its velocity, where it cannot be measured.',
    source: 'measured on published assignments; a starting point',
  }),
  confusedFluxShare: key(z.number().min(0.01).max(1).default(0.2), {
    title: 'Share of the flux that confuses',
    unit: '',
    description: 'A second galaxy at the gas velocity counts when this share of the expected flux is its.',
    source: OWN,
  }),
  nearlyDarkRatio: key(z.number().min(1).max(10_000).default(20), {
    title: 'Nearly dark above',
    unit: 'solar masses per solar luminosity (r)',
    description: 'A starlit detection with M_HI/L_r over this is nearly dark.',
    source: PRACTICE,
  }),
});

const absence = z.strictObject({
  darkProbability: key(z.number().min(0.5).max(1).default(0.8), {
    title: 'P(none) for dark',
    unit: '',
    description: 'Least probability of no stars for the verdict dark.',
    source: OWN,
  }),
  noneOrMissedProbability: key(z.number().min(0.5).max(1).default(0.9), {
    title: 'P(none) + P(missed) for dark',
    unit: '',
    description: 'Least sum for the verdict dark.',
    source: OWN,
  }),
  minimumPower: key(z.number().min(0.5).max(1).default(0.99), {
    title: 'Least power',
    unit: '',
    description:
      'Chance that an ordinary galaxy with this much gas would have been seen here; below it no detection is called dark.',
    source: OWN,
  }),
  depthPenaltyMag: key(z.number().min(0).max(3).default(0.5), {
    title: 'Depth penalty',
    unit: 'mag',
    description: 'Real catalogues reach less deep for extended sources than the noise allows.',
    source: 'common practice, 0.5 to 1 mag',
  }),
  rollOffMag: key(z.number().min(0.01).max(2).default(0.3), {
    title: 'Width of the completeness roll-off',
    unit: 'mag',
    description: 'Of the error function that falls from 1 to 0 about the limit.',
    source: PRACTICE,
  }),
  effectiveRadiiArcsec: key(z.array(z.number().positive().max(600)).min(1).max(10).default([2, 5, 10, 20]), {
    title: 'Effective radii of the limits',
    unit: 'arcsec',
    description: 'Sizes for which limits of extended sources are stated.',
    source: PRACTICE,
  }),
  seeingFwhmArcsec: key(z.number().positive().max(100).default(1.3), {
    title: 'Seeing where none is stated',
    unit: 'arcsec',
    description: 'Optical bands; 2 infrared, 5 ultraviolet, 6 for W1.',
    source: PRACTICE,
  }),
  maximumReddeningMag: key(z.number().min(0).max(10).default(0.3), {
    title: 'Most reddening',
    unit: 'mag E(B-V)',
    description: 'Above it optical and ultraviolet silence is not testable.',
    source: PRACTICE,
  }),
  minimumLatitudeDeg: key(z.number().min(0).max(90).default(10), {
    title: 'Least Galactic latitude',
    unit: 'deg',
    description: 'Below it a caution is given; with no reddening known, optical silence is not testable.',
    source: PRACTICE,
  }),
  stellarMassToLight: key(z.array(z.number().positive().max(10)).min(1).max(4).default([0.5, 1]), {
    title: 'Mass-to-light ratios of the limits',
    unit: 'solar (r)',
    description: 'Young and conservative; both are stated.',
    source: PRACTICE,
  }),
  starMask: key(z.boolean().default(true), {
    title: 'Mask bright stars',
    unit: '',
    description: 'Where the survey has a star list: radius 1630 x 1.396^-G arcsec for G < 13.',
    source: 'Legacy Surveys bright-star relation',
  }),
});

const surroundings = z.strictObject({
  radiusMpc: key(z.number().positive().max(20).default(1), {
    title: 'Neighbour radius',
    unit: 'Mpc',
    description: 'Projected, at the distance of the gas; the limit is inclusive.',
    source: 'Argudo-Fernandez et al. (2015) (from memory)',
  }),
  velocityWindowKms: key(z.number().positive().max(10_000).default(500), {
    title: 'Velocity window',
    unit: 'km/s',
    description: 'Largest |dv| of a neighbour; the limit is inclusive.',
    source: 'Argudo-Fernandez et al. (2015) (from memory)',
  }),
  faintestNeighbourMag: key(z.number().min(-25).max(0).default(-17), {
    title: 'Faintest neighbour that counts',
    unit: 'mag (M_r)',
    description: 'Fainter galaxies cannot shed this much gas.',
    source: OWN,
  }),
  aloneProbability: key(z.number().min(0.5).max(1).default(0.8), {
    title: 'P(no neighbour) for alone',
    unit: '',
    description: 'Least probability for the verdict alone.',
    source: OWN,
  }),
  minimumCovered: key(z.number().min(0).max(1).default(0.8), {
    title: 'Least covered share',
    unit: '',
    description: 'Of the neighbour circle; below it no detection is called alone.',
    source: PRACTICE,
  }),
  schechterPhiStarH3: key(z.number().positive().max(1).default(0.0149), {
    title: 'Schechter phi*',
    unit: 'h^3 Mpc^-3',
    description: 'Of the luminosity function used for unseen neighbours.',
    source: 'Blanton et al. (2003), ApJ 592, 819',
  }),
  schechterMStarH: key(z.number().min(-25).max(-15).default(-20.44), {
    title: 'Schechter M* - 5 log h',
    unit: 'mag',
    description: 'Characteristic magnitude.',
    source: 'Blanton et al. (2003), ApJ 592, 819',
  }),
  schechterAlpha: key(z.number().min(-1.9).max(0).default(-1.05), {
    title: 'Schechter alpha',
    unit: '',
    description: 'Faint-end slope; others find -1.25.',
    source: 'Blanton et al. (2003), ApJ 592, 819 (from memory)',
  }),
  clusterRadiusMpc: key(z.number().positive().max(10).default(2), {
    title: 'Group and cluster reach',
    unit: 'R200',
    description: 'Membership out to this many R200 and three velocity dispersions.',
    source: PRACTICE,
  }),
});

const doubts = z.strictObject({
  minimumReliability: key(z.number().min(0).max(1).default(0.95), {
    title: 'Least reliability of the line',
    unit: '',
    description: 'Below it: confirm the line first.',
    source: PRACTICE,
  }),
  strongDebrisKpc: key(z.number().positive().max(5000).default(250), {
    title: 'Strong debris, radius',
    unit: 'kpc',
    description: 'At the distance of the neighbour.',
    source: PRACTICE,
  }),
  strongDebrisKms: key(z.number().positive().max(5000).default(300), {
    title: 'Strong debris, velocity',
    unit: 'km/s',
    description: 'Largest |dv|.',
    source: PRACTICE,
  }),
  possibleDebrisKpc: key(z.number().positive().max(5000).default(500), {
    title: 'Possible debris, radius',
    unit: 'kpc',
    description: 'At the distance of the neighbour.',
    source: PRACTICE,
  }),
  possibleDebrisKms: key(z.number().positive().max(5000).default(500), {
    title: 'Possible debris, velocity',
    unit: 'km/s',
    description: 'Largest |dv|.',
    source: PRACTICE,
  }),
  debrisGasMass: key(z.number().positive().default(1e9), {
    title: 'Gas mass of a donor',
    unit: 'solar masses',
    description: 'A neighbour with this much HI can shed a cloud.',
    source: PRACTICE,
  }),
  debrisStellarMass: key(
    z
      .number()
      .positive()
      .default(10 ** 9.5),
    { title: 'Stellar mass of a donor', unit: 'solar masses', description: 'Or with these stars.', source: PRACTICE },
  ),
  cloudVelocityKms: key(z.number().positive().max(1000).default(400), {
    title: 'Cloud velocity',
    unit: 'km/s (LSR)',
    description: 'High-velocity clouds lie below this.',
    source: 'Wakker (1991), A&A 250, 499',
  }),
  deviationVelocityKms: key(z.number().positive().max(500).default(50), {
    title: 'Deviation velocity',
    unit: 'km/s',
    description: 'Beyond what Galactic rotation allows.',
    source: 'Wakker (1991), A&A 250, 499',
  }),
  interference: key(
    z
      .array(
        z.strictObject({
          lowMhz: z.number().positive(),
          highMhz: z.number().positive(),
          name: z.string().max(100).default(''),
        }),
      )
      .max(200)
      .default([]),
    {
      title: 'Interference bands',
      unit: 'MHz',
      description: 'Observed frequencies to distrust.',
      source: 'given by the team',
    },
  ),
});

const robustness = z.strictObject({
  draws: key(z.int().min(0).max(100_000).default(2000), {
    title: 'Draws',
    unit: '',
    description: 'Of what the score holds fixed; 0 switches it off.',
    source: 's.e. 0.011 at p = 0.5',
  }),
  seed: key(z.int().min(0).max(4_294_967_295).default(1), {
    title: 'Seed',
    unit: '',
    description: 'Same seed, same numbers.',
    source: OWN,
  }),
});

const control = z.strictObject({
  offsetsPerSource: key(z.int().min(0).max(1000).default(20), {
    title: 'Shifted positions a source',
    unit: '',
    description: 'Repeats the match at shifted places; 0 switches it off.',
    source: PRACTICE,
  }),
});

/** One immutable, numbered set of radii, windows, thresholds and rules. `{}` means all the defaults. */
export const criteriaSettings = z.strictObject({
  distance: distance.prefault({}),
  position: position.prefault({}),
  counterpart: counterpart.prefault({}),
  absence: absence.prefault({}),
  surroundings: surroundings.prefault({}),
  doubts: doubts.prefault({}),
  robustness: robustness.prefault({}),
  control: control.prefault({}),
});
export type CriteriaSettings = z.output<typeof criteriaSettings>;
export type CriteriaSettingsInput = z.input<typeof criteriaSettings>;
export const CRITERIA_SECTIONS = Object.keys(criteriaSettings.shape) as (keyof CriteriaSettings)[];

export const createCriteriaRequest = z.strictObject({
  settings: criteriaSettings.prefault({}),
  note: z.string().trim().max(2000).default(''),
});
export type CreateCriteriaRequest = z.output<typeof createCriteriaRequest>;

export const criteria = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  number: z.int(),
  settings: criteriaSettings,
  note: z.string(),
  createdBy: z.string(),
  createdAt: z.iso.datetime(),
  usedByRuns: z.int(),
});
export type Criteria = z.output<typeof criteria>;
