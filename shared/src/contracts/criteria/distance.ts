import { z } from 'zod';
import { key, PRACTICE } from './key.ts';

/** How a distance is chosen and what errs in it. */
export const distance = z.strictObject({
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
