import { DomainError } from '../domain-error.ts';

/**
 * Seeded generator of random numbers: xoshiro128** (Blackman & Vigna 2018), state filled by SplitMix32.
 *
 * The same seed and stream give the same numbers on every machine. Give each source and each purpose a stream of its own
 * (`randomStream`), so that leaving one source out, or drawing more of one thing, moves nothing else.
 * Name for the record: GENERATOR.
 */
export class Random {
  private readonly state: Uint32Array;
  private spare = NaN;

  /** @param seed any unsigned 32-bit integer. @throws {DomainError} for any other number */
  constructor(seed: number) {
    if (!(Number.isInteger(seed) && seed >= 0 && seed <= 0xffffffff)) {
      throw new DomainError(`Random: the seed must be an integer from 0 to 4294967295, got ${seed}`);
    }
    this.state = new Uint32Array(4);
    let mixed = seed;
    for (let k = 0; k < 4; k++) {
      mixed = (mixed + 0x9e3779b9) | 0;
      this.state[k] = scramble(mixed);
    }
  }

  /** A generator in a given state, to compare with the published one; not all zero. */
  static fromState(state: readonly [number, number, number, number]): Random {
    if (state.every((word) => word === 0)) throw new DomainError('Random: the state must not be all zero');
    const random = new Random(0);
    random.state.set(state);
    return random;
  }

  /** Next 32 random bits, as an unsigned integer. */
  bits(): number {
    const s = this.state;
    const result = Math.imul(rotate(Math.imul(s[1]!, 5), 7), 9) >>> 0;
    const shifted = s[1]! << 9;
    s[2]! ^= s[0]!;
    s[3]! ^= s[1]!;
    s[1]! ^= s[2]!;
    s[0]! ^= s[3]!;
    s[2]! ^= shifted;
    s[3] = rotate(s[3]!, 11);
    return result;
  }

  /** Uniform deviate in [0, 1), 53 bits. */
  uniform(): number {
    const high = this.bits() >>> 5;
    const low = this.bits() >>> 6;
    return (high * 67_108_864 + low) / 9_007_199_254_740_992;
  }

  /** Standard normal deviate. Source: Box & Muller (1958); every second call uses up two uniform deviates. */
  gaussian(): number {
    if (!Number.isNaN(this.spare)) {
      const kept = this.spare;
      this.spare = NaN;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(1 - this.uniform()));
    const angle = 2 * Math.PI * this.uniform();
    this.spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  }
}

/** Stored with every result that rests on random numbers. */
export const GENERATOR = 'xoshiro128** 1.1, SplitMix32 seeding, Box-Muller, FNV-1a streams';

/**
 * Generator of one source and purpose.
 *
 * @param seed seed of the run, unsigned 32-bit integer
 * @param key what the numbers are for, for example the row's identifier and "distance"
 * @returns a generator whose numbers depend on seed and key only
 */
export function randomStream(seed: number, key: string): Random {
  let hash = 0x811c9dc5;
  for (let k = 0; k < key.length; k++) {
    const unit = key.charCodeAt(k);
    hash = Math.imul(hash ^ (unit & 0xff), 0x01000193);
    hash = Math.imul(hash ^ (unit >>> 8), 0x01000193);
  }
  return new Random((scramble(hash) ^ scramble(seed + 0x9e3779b9)) >>> 0);
}

function scramble(value: number): number {
  let z = value | 0;
  z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
  z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
  return (z ^ (z >>> 16)) >>> 0;
}

function rotate(value: number, by: number): number {
  return (value << by) | (value >>> (32 - by));
}
