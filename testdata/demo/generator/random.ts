/** Seeded random numbers (mulberry32 by T. Ettinger, public domain, from memory): the same seed, the same universe. */
export class Random {
  #state: number;

  constructor(seed: number) {
    this.#state = seed >>> 0;
  }

  /** Uniform in [0, 1). */
  uniform(low = 0, high = 1): number {
    this.#state = (this.#state + 0x6d2b79f5) >>> 0;
    let t = this.#state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return low + (high - low) * (((t ^ (t >>> 14)) >>> 0) / 4294967296);
  }

  normal(mean = 0, sigma = 1): number {
    const radius = Math.sqrt(-2 * Math.log(1 - this.uniform()));
    return mean + sigma * radius * Math.cos(2 * Math.PI * this.uniform());
  }

  poisson(mean: number): number {
    if (mean > 50) return Math.max(0, Math.round(this.normal(mean, Math.sqrt(mean))));
    const limit = Math.exp(-mean);
    let count = 0;
    for (let product = this.uniform(); product > limit; product *= this.uniform()) count += 1;
    return count;
  }

  pick<T>(list: readonly T[]): T {
    return list[Math.floor(this.uniform() * list.length)]!;
  }

  /** Draws from a tabulated cumulative distribution by linear interpolation. */
  fromCumulative(values: readonly number[], cumulative: readonly number[]): number {
    const target = this.uniform() * cumulative.at(-1)!;
    const upper = cumulative.findIndex((value) => value >= target);
    if (upper <= 0) return values[0]!;
    const share = (target - cumulative[upper - 1]!) / (cumulative[upper]! - cumulative[upper - 1]!);
    return values[upper - 1]! + share * (values[upper]! - values[upper - 1]!);
  }
}
