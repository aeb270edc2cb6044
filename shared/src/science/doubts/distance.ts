import { doubt, inWords } from './doubt.ts';
import type { Doubt, DoubtRule } from './doubt.ts';

export interface DistanceInput {
  /** Where the distance comes from; 'none' where none is usable. */
  kind: 'measured' | 'flow' | 'hubble' | 'none';
  /** Distance and error, Mpc; NaN where there is none. */
  distanceMpc: number;
  errorMpc: number;
  /** Velocity in the Local Group frame, km/s; NaN where missing. */
  localGroupKms: number;
  /** Cautions of the distance rule (inside a cluster's cone, triple-valued zone, ...). */
  cautions: readonly string[];
}

const WATCH = 0.2;
const SERIOUS = 0.4;
const SLOW_KMS = 1500;

const RULE: DoubtRule = {
  name: 'distance',
  rule: `serious if no distance is usable or its error exceeds ${100 * SERIOUS} per cent; watch above ${100 * WATCH} per cent, under v_LG ${SLOW_KMS} km/s unless measured, or with a caution`,
  source: 'common practice; HI1232+20, whose published distances run from 5.5 to 25 Mpc',
};

/**
 * Doubt about the distance, which every mass, size and neighbour scales with.
 *
 * @param input the distance chosen and its cautions
 * @returns the doubt; its value is the fractional error
 */
export function distanceDoubt(input: DistanceInput): Doubt {
  const { kind, distanceMpc, errorMpc, localGroupKms, cautions } = input;
  if (kind === 'none' || !(distanceMpc > 0 && distanceMpc < Infinity)) {
    return doubt(RULE, 'serious', 'No distance is usable: quantities in kpc and solar units are withheld.');
  }
  // A negative error is a mark for a missing one.
  const fraction = errorMpc >= 0 ? errorMpc / distanceMpc : NaN;
  const word = { measured: 'measured', flow: 'from the flow model', hubble: "from Hubble's law" }[kind];
  const caution = cautions.length > 0 ? `; ${cautions.join('; ')}` : '';
  const say = (grade: Doubt['grade'], error: string) =>
    doubt(
      RULE,
      grade,
      `The distance, ${inWords(distanceMpc)} Mpc ${word}, ${error}${caution}.`,
      fraction,
      'fractional error',
    );
  if (!Number.isFinite(fraction)) return say('watch', 'has no stated error');
  const error = `is good to ${inWords(100 * fraction)} per cent`;
  if (fraction > SERIOUS) return say('serious', error);
  const slow = kind !== 'measured' && localGroupKms < SLOW_KMS;
  return say(fraction > WATCH || slow || caution ? 'watch' : 'clear', error);
}
