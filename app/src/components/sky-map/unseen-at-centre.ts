import { containsOrigin } from '@eremite/shared/drawing/panel-plane';
import type { UncoveredArea } from '@eremite/shared/drawing/uncovered-cells';

/** Names of the catalogues whose hatching covers the detection itself. */
export const unseenAtCentre = (uncovered: readonly UncoveredArea[]): string[] =>
  uncovered.filter(({ cells }) => cells.some((ring) => containsOrigin(ring))).map(({ name }) => name);
