import { z } from 'zod';
import { key, OWN, PRACTICE } from './key.ts';

/** How objects are weighed and what makes a detection starlit. */
export const counterpart = z.strictObject({
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
  learnVelocities: key(z.boolean().default(true), {
    title: 'Measure the velocity background',
    unit: '',
    description:
      'With 500 redshifts or more their spread is taken from the catalogues themselves, and with 200 in rings about the detections the share that clusters; in a dense place the local share.',
    source: OWN,
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
