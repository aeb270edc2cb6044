import { z } from 'zod';
import { criteriaSettings } from './criteria.ts';
import { verdictDetail, verdictItem } from './verdict.ts';

/** Detections of one preview: more is what a run is for. */
export const MOST_PREVIEWED = 20;

export const previewRequest = z.strictObject({
  settings: criteriaSettings.prefault({}),
  detectionIds: z.array(z.uuid()).min(1).max(MOST_PREVIEWED),
  /** All published catalogues where absent. */
  catalogueIds: z.array(z.uuid()).max(200).optional(),
});
export type PreviewRequest = z.output<typeof previewRequest>;

export const previewItem = verdictDetail.omit({ runId: true, runNumber: true, criteriaNumber: true }).extend({
  /** The verdict of the latest finished run, if it has one on this detection. */
  before: verdictItem.nullable(),
});

/** What some detections would become under other criteria; nothing of it is kept. */
export const preview = z.object({
  items: z.array(previewItem),
  /** The run whose learnt priors and relation were used; null where there is none. */
  basedOn: z.object({ id: z.uuid(), number: z.int() }).nullable(),
  /** Sentences: in what it may differ from a run under the same criteria. */
  notes: z.array(z.string()),
  seconds: z.number(),
});
export type Preview = z.output<typeof preview>;
