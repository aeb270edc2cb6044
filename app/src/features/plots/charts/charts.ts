import type { Chart } from './chart.ts';
import { GAS_TO_LIGHT } from './gas-to-light.ts';
import { TULLY_FISHER } from './tully-fisher.ts';
import { VERDICT_PLANE } from './verdict-plane.ts';

/** The plots of a survey, in the order of the page. */
export const CHARTS: readonly Chart[] = [VERDICT_PLANE, TULLY_FISHER, GAS_TO_LIGHT];
