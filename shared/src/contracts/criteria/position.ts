import { z } from 'zod';
import { key, OWN, PRACTICE } from './key.ts';

/** Where a counterpart may lie. */
export const position = z.strictObject({
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
