import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { StarlightThresholds } from '@eremite/shared/science/counterpart/starlight';

const made = new WeakMap<CriteriaSettings, StarlightThresholds>();

/** Thresholds of the starlight verdict by the criteria; made once, since every detection and every draw asks. */
export function starlightThresholds(criteria: CriteriaSettings): StarlightThresholds {
  let thresholds = made.get(criteria);
  if (!thresholds) made.set(criteria, (thresholds = { ...criteria.absence, ...criteria.counterpart }));
  return thresholds;
}
