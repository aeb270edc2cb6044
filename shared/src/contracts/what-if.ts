import { z } from 'zod';
import { neighbour } from './verdict.ts';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

const probability = z.number().min(0).max(1);

/** The verdict of one detection at one distance. */
export const whatIfPoint = z.object({
  /** Luminosity distance, Mpc. */
  distanceMpc: z.number(),
  /** Angular-diameter distance, Mpc; used for projection. */
  angularMpc: z.number(),
  logHiMass: z.number().nullable(),
  searchRadiusArcsec: z.number(),
  starlight: z.enum(STARLIGHT_VERDICTS),
  pNone: probability,
  pMissed: probability,
  power: probability.nullable(),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  pAlone: probability.nullable(),
  nearest: z.object({ name: z.string(), separationKpc: z.number(), velocityDifferenceKms: z.number() }).nullable(),
});
export type WhatIfPoint = z.output<typeof whatIfPoint>;

/** What a verdict would be were the distance another one that had been measured; everything else stays as in the run. */
export const whatIf = z.object({
  /** From the nearest distance to the furthest; closer together where a verdict changes. */
  points: z.array(whatIfPoint),
  /** 1-sigma error over distance that every distance is given; null where the run had none. */
  distanceFraction: z.number().nullable(),
  /** All galaxies that are neighbours at the nearest distance, and so at any of them. */
  neighbours: z.array(neighbour),
  /** In what it may differ from a run. */
  notes: z.array(z.string()),
});
export type WhatIf = z.output<typeof whatIf>;
