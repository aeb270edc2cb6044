import type { MethodEntry } from './method-entry.ts';
import { absence } from './entries/absence.ts';
import { confusion } from './entries/confusion.ts';
import { control } from './entries/control.ts';
import { counterpart } from './entries/counterpart.ts';
import { distance } from './entries/distance.ts';
import { expected } from './entries/expected.ts';
import { extinction } from './entries/extinction.ts';
import { gasToLight } from './entries/gas-to-light.ts';
import { position } from './entries/position.ts';
import { prior } from './entries/prior.ts';
import { reliability } from './entries/reliability.ts';
import { stability } from './entries/stability.ts';
import { surroundings } from './entries/surroundings.ts';
import { velocity } from './entries/velocity.ts';

/** Every method behind a number, in the order in which they build on each other. */
export const METHODS: readonly MethodEntry[] = [
  position,
  distance,
  velocity,
  expected,
  prior,
  reliability,
  counterpart,
  confusion,
  gasToLight,
  absence,
  extinction,
  surroundings,
  stability,
  control,
];
