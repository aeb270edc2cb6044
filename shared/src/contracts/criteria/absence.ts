import { z } from 'zod';
import { key, OWN, PRACTICE } from './key.ts';

/** When nothing found means that nothing is there. */
export const absence = z.strictObject({
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
  galaxyMaskRadii: key(z.number().min(0).max(10).default(2), {
    title: 'Mask large galaxies to',
    unit: 'half-light radii',
    description:
      'Galaxies of 10 arcsec or more hide what lies behind them; not those that may be the counterpart. 0 switches it off.',
    source: 'common practice: one isophotal radius, about two half-light radii of a disc',
  }),
  piecesChance: key(z.number().min(0).max(0.1).default(0.003), {
    title: 'Chance of a crowd of faint objects',
    unit: '',
    description:
      'Where the catalogue holds more faint objects than this chance allows, a galaxy may be there in pieces and nothing is called dark. 0 switches it off.',
    source: OWN,
  }),
});
