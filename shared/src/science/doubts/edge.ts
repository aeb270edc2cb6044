import { DomainError } from '../domain-error.ts';
import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface EdgeInput {
  /** Covered share of the neighbour window, 0-1; NaN where coverage or distance is unknown. */
  neighbourCovered: number;
  /** Covered share of the counterpart search circle, 0-1; NaN where unknown. */
  counterpartCovered: number;
}

const SERIOUS = 0.8;
const WATCH = 0.98;

const RULE: DoubtRule = {
  name: 'edge',
  rule: `serious if less than ${SERIOUS} of the counterpart circle or of the neighbour window is covered (never alone then), watch if less than ${WATCH}`,
  source: 'common practice',
};

/**
 * Doubt that the catalogues end too near.
 *
 * @param input covered shares of the two circles
 * @returns the doubt; its value is the smaller share
 * @throws {DomainError} if a share is outside 0-1
 *
 * Beyond an edge the nearest neighbour is only a lower limit.
 *
 * Method: doubts.
 */
export function edge(input: EdgeInput): Doubt {
  const parts: [string, number][] = [
    ['neighbour window', input.neighbourCovered],
    ['counterpart circle', input.counterpartCovered],
  ];
  const wrong = parts.find(([, share]) => share < 0 || share > 1);
  if (wrong) throw new DomainError(`edge: the covered share of the ${wrong[0]} must lie in 0-1, got ${wrong[1]}`);
  const known = parts.filter(([, share]) => Number.isFinite(share)).sort((a, b) => a[1] - b[1]);
  const worst = known[0];
  if (!worst) return doubt(RULE, 'not testable here', 'What the catalogues cover is not known.');
  const [where, share] = worst;
  const grade =
    share < SERIOUS ? 'serious' : share < WATCH ? 'watch' : known.length < 2 ? 'not testable here' : 'clear';
  const other = known.length < 2 ? '; of the other circle it is not known' : '';
  return doubt(
    RULE,
    grade,
    `${inWords(100 * share)} per cent of the ${where} is covered${other}.`,
    share,
    'covered share',
  );
}
