import { DomainError } from '../domain-error.ts';
import { assertOrder, FINEST_ORDER } from './healpix.ts';

/** NUNIQ packing, 4 · 4^order + index. Source: IVOA MOC 2.0. @throws {DomainError} for an order above 29 */
export function toUniq(order: number, cell: bigint): bigint {
  assertOrder('toUniq', order, FINEST_ORDER);
  return (4n << BigInt(2 * order)) + cell;
}

/** Order and nested index of a NUNIQ number. @throws {DomainError} for a number that is none */
export function fromUniq(uniq: bigint): { order: number; cell: bigint } {
  const order = Math.floor((uniq.toString(2).length - 3) / 2);
  if (uniq < 4n || order > FINEST_ORDER) throw new DomainError(`fromUniq: ${uniq} is not a NUNIQ number`);
  return { order, cell: uniq - (4n << BigInt(2 * order)) };
}
