import { z } from 'zod';
import { absence } from './criteria/absence.ts';
import { control } from './criteria/control.ts';
import { counterpart } from './criteria/counterpart.ts';
import { distance } from './criteria/distance.ts';
import { doubts } from './criteria/doubts.ts';
import { position } from './criteria/position.ts';
import { robustness } from './criteria/robustness.ts';
import { surroundings } from './criteria/surroundings.ts';

/** One immutable, numbered set of radii, windows, thresholds and rules. `{}` means all the defaults. */
export const criteriaSettings = z.strictObject({
  distance: distance.prefault({}),
  position: position.prefault({}),
  counterpart: counterpart.prefault({}),
  absence: absence.prefault({}),
  surroundings: surroundings.prefault({}),
  doubts: doubts.prefault({}),
  robustness: robustness.prefault({}),
  control: control.prefault({}),
});
export type CriteriaSettings = z.output<typeof criteriaSettings>;
export type CriteriaSettingsInput = z.input<typeof criteriaSettings>;
export const CRITERIA_SECTIONS = Object.keys(criteriaSettings.shape) as (keyof CriteriaSettings)[];

export const createCriteriaRequest = z.strictObject({
  settings: criteriaSettings.prefault({}),
  note: z.string().trim().max(2000).default(''),
});
export type CreateCriteriaRequest = z.output<typeof createCriteriaRequest>;

export const criteria = z.object({
  id: z.uuid(),
  surveyId: z.uuid(),
  number: z.int(),
  settings: criteriaSettings,
  note: z.string(),
  createdBy: z.string(),
  createdAt: z.iso.datetime(),
  usedByRuns: z.int(),
});
export type Criteria = z.output<typeof criteria>;
