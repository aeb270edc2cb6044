import { z } from 'zod';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from './words.ts';

/** Numbers of one detection behind the plots of a survey; masses, lights and speeds as log10. */
export const plotPoint = z.object({
  detectionId: z.uuid(),
  name: z.string(),
  starlight: z.enum(STARLIGHT_VERDICTS),
  surroundings: z.enum(SURROUNDINGS_VERDICTS),
  /** P(none) + P(missed) + P(spurious): no object of the catalogues is the counterpart. */
  pNoStarlight: z.number(),
  pAlone: z.number().nullable(),
  /** log10 solar masses, and its error from flux and distance, dex. */
  logHiMass: z.number().nullable(),
  logHiMassError: z.number().nullable(),
  /** log10 L_r, solar; with `lightIsLimit` an upper limit. */
  logLight: z.number().nullable(),
  lightIsLimit: z.boolean(),
  /** log10 of M_HI / L_r, solar; with `lightIsLimit` a lower limit. */
  logGasToLight: z.number().nullable(),
  logGasToLightError: z.number().nullable(),
  /** log10 of gas and stars, solar masses; where the light is a limit of the gas alone ... */
  logBaryonicMass: z.number().nullable(),
  /** ... and of the gas with as many stars as the limit allows. Equal where the light is known. */
  logBaryonicMassUpTo: z.number().nullable(),
  /** log10 of the rotation speed, km/s, for the median of random inclinations, and the 16th and 84th per cent. */
  logSpeed: z.number().nullable(),
  logSpeedLow: z.number().nullable(),
  logSpeedHigh: z.number().nullable(),
});
export type PlotPoint = z.output<typeof plotPoint>;

export const surveyPlots = z.object({
  runNumber: z.int(),
  /** Stellar mass over r luminosity by which light was turned into stars, solar units. */
  massToLightR: z.number(),
  points: z.array(plotPoint),
});
export type SurveyPlots = z.output<typeof surveyPlots>;

export const plotsQuery = z.object({ format: z.enum(['json', 'csv', 'votable']).default('json') });
