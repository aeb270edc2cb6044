import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { DetectionSettings } from '@eremite/shared/science/photometry/completeness';

/** How a catalogue loses galaxies near its limit, by the criteria. */
export function detectionSettings({ absence }: CriteriaSettings): DetectionSettings {
  // No ceiling below one: what hides even bright galaxies (stars, edges) is counted by masks and coverage.
  return { rollOffMag: absence.rollOffMag, penaltyMag: absence.depthPenaltyMag, ceiling: 1 };
}
