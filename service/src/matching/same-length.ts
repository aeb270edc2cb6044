import { DomainError } from '@eremite/shared/science/domain-error';
import type { Numbers } from './sky-position.ts';

/**
 * @returns the common length of the columns
 * @throws {DomainError} naming the lengths if they differ
 */
export function checkSameLength(columns: Record<string, Numbers>): number {
  const sizes = new Set(Object.values(columns).map((values) => values.length));
  if (sizes.size <= 1) return [...sizes][0] ?? 0;
  const lengths = Object.entries(columns).map(([name, values]) => `${name} ${values.length}`);
  throw new DomainError(`columns of different length: ${lengths.join(', ')}`);
}
