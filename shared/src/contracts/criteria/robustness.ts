import { z } from 'zod';
import { key, OWN } from './key.ts';

/** Draws of what the score holds fixed. */
export const robustness = z.strictObject({
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
