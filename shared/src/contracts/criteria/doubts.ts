import { z } from 'zod';
import { key, PRACTICE } from './key.ts';

/** Thresholds of what could fake the result. */
export const doubts = z.strictObject({
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
