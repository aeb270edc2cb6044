import { z } from 'zod';
import { criteriaSettings } from './criteria.ts';
import { intakeSettings } from './intake-settings.ts';
import { cosmology } from './survey.ts';

export const PLAN_OUTPUTS = ['verdicts.csv', 'candidates.csv', 'neighbours.csv', 'summary.json'] as const;

/** The plan file: the whole job with no browser and no server. Paths are relative to the plan. */
export const plan = z.strictObject({
  survey: z
    .strictObject({
      name: z.string().max(200).default('survey'),
      description: z.string().optional(),
      cosmology: cosmology.prefault({}),
    })
    .prefault({}),
  tables: z
    .array(z.strictObject({ file: z.string().min(1), settings: intakeSettings }))
    .min(1)
    .max(200),
  criteria: criteriaSettings.prefault({}),
  outputs: z
    .array(z.enum(PLAN_OUTPUTS))
    .min(1)
    .default([...PLAN_OUTPUTS]),
});
export type Plan = z.output<typeof plan>;
