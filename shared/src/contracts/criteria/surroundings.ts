import { z } from 'zod';
import { key, OWN, PRACTICE } from './key.ts';

/** What counts as a neighbour, and when a detection is alone. */
export const surroundings = z.strictObject({
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
