import type { MethodEntry } from '@eremite/shared/science/method-entry';
import { confusion } from '@eremite/shared/science/counterpart/confusion.method';
import { counterpart } from '@eremite/shared/science/counterpart/counterpart.method';
import { position } from '@eremite/shared/science/counterpart/position.method';
import { prior } from '@eremite/shared/science/counterpart/prior.method';
import { reliability } from '@eremite/shared/science/counterpart/reliability.method';
import { velocity } from '@eremite/shared/science/velocity/velocity.method';
import { distance } from '@eremite/shared/science/distance/distance.method';
import { doubts } from '@eremite/shared/science/doubts/doubts.method';
import { expected } from '@eremite/shared/science/hydrogen/expected.method';
import { gasToLight } from '@eremite/shared/science/hydrogen/gas-to-light.method';
import { hiMassEntry } from '@eremite/shared/science/hydrogen/hi-mass.method';
import { absence } from '@eremite/shared/science/photometry/absence.method';
import { extinction } from '@eremite/shared/science/photometry/extinction.method';
import { limits } from '@eremite/shared/science/photometry/limits.method';
import { control } from '@eremite/shared/science/robustness/control.method';
import { stability } from '@eremite/shared/science/robustness/stability.method';
import { measures } from '@eremite/shared/science/surroundings/measures.method';
import { surroundings } from '@eremite/shared/science/surroundings/surroundings.method';

/** Every method behind a number, in the order in which they build on each other. */
export const METHODS: readonly MethodEntry[] = [
  position,
  distance,
  hiMassEntry,
  velocity,
  expected,
  prior,
  reliability,
  counterpart,
  confusion,
  gasToLight,
  absence,
  limits,
  extinction,
  surroundings,
  measures,
  doubts,
  stability,
  control,
];
