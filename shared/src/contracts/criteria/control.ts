import { z } from 'zod';
import { key, PRACTICE } from './key.ts';

/** The match repeated at shifted positions. */
export const control = z.strictObject({
  offsetsPerSource: key(z.int().min(0).max(1000).default(20), {
    title: 'Shifted positions a source',
    unit: '',
    description: 'Repeats the match at shifted places; 0 switches it off.',
    source: PRACTICE,
  }),
});
