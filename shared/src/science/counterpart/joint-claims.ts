import { DomainError } from '../domain-error.ts';

/** One detection's claims on galaxies that others claim too: probabilities judged by itself. */
export interface Claimant {
  /** Probability of each shared galaxy, by its key. The rest of its probability is on what nobody else claims. */
  claims: ReadonlyMap<string, number>;
}

/** Assignments looked at before the faintest claims are left out. */
const MOST_ASSIGNMENTS = 200_000;

/**
 * Probabilities of shared galaxies when no galaxy belongs to two detections.
 *
 * @param claimants detections that share galaxies, each with its own posterior of every shared one; sums at most one
 * @returns for each claimant the factor by which the weight of each shared galaxy is to be multiplied, against all that is
 *   not shared, for its posterior to be the joint one; one for claims left out
 * @throws {DomainError} for probabilities out of range
 *
 * The posterior of all detections together is the product of their own, restricted to assignments that use no galaxy
 * twice and summed over all of them. With one claimant nothing changes. Where there would be more than 200,000
 * assignments the least claims are left out first. Source: Sutherland & Saunders (1992) for one detection; the
 * restriction is Bayes' theorem.
 *
 * Method: counterpart.
 */
export function jointClaimFactors(claimants: readonly Claimant[]): Map<string, number>[] {
  const claims = limited(claimants);
  const free = claims.map((each) => {
    let sum = 0;
    for (const p of each.values()) {
      if (!(p >= 0 && p <= 1 + 1e-9)) throw new DomainError(`jointClaimFactors: probability ${p}`);
      sum += p;
    }
    return Math.max(1e-12, 1 - sum);
  });
  const withFree = claims.map(() => 0);
  const withKey = claims.map((each) => new Map([...each.keys()].map((key) => [key, 0])));
  const taken = new Set<string>();
  const choice: (string | null)[] = claims.map(() => null);
  const visit = (i: number, weight: number): void => {
    if (i === claims.length) {
      choice.forEach((key, k) => {
        if (key === null) withFree[k]! += weight;
        else withKey[k]!.set(key, withKey[k]!.get(key)! + weight);
      });
      return;
    }
    choice[i] = null;
    visit(i + 1, weight * free[i]!);
    for (const [key, p] of claims[i]!) {
      if (p === 0 || taken.has(key)) continue;
      taken.add(key);
      choice[i] = key;
      visit(i + 1, weight * p);
      taken.delete(key);
    }
  };
  visit(0, 1);
  return claimants.map(({ claims: all }, i) => {
    const factors = new Map<string, number>();
    for (const key of all.keys()) {
      const alone = claims[i]!.get(key);
      const joint = withKey[i]!.get(key);
      factors.set(key, alone ? (joint! / withFree[i]!) * (free[i]! / alone) : 1);
    }
    return factors;
  });
}

/** Claims without the least ones, until their assignments can be counted. */
function limited(claimants: readonly Claimant[]): Map<string, number>[] {
  const claims = claimants.map(({ claims: all }) => new Map(all));
  const assignments = () => claims.reduce((product, { size }) => product * (1 + size), 1);
  const ranked = claims
    .flatMap((each, i) => [...each].map(([key, p]) => ({ i, key, p })))
    .sort((a, b) => a.p - b.p || a.i - b.i || (a.key < b.key ? -1 : 1));
  for (const { i, key } of ranked) {
    if (assignments() <= MOST_ASSIGNMENTS) break;
    claims[i]!.delete(key);
  }
  return claims;
}
