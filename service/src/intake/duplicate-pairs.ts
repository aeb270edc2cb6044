import type { DuplicatePair } from '@eremite/shared/contracts/duplicate-pair';
import { type PackedColumns, textAt, type TextColumn } from '../tiles/column-pack.ts';
import type { Duplicate } from './find-duplicates.ts';

/** Duplicates with what a person needs to judge them, in the order given. */
export function duplicatePairs({ rows, columns }: PackedColumns, duplicates: readonly Duplicate[]): DuplicatePair[] {
  const numbers = columns['row'] as Uint32Array;
  const wanted = new Set(duplicates.flatMap(({ row, of }) => [row, of]));
  const places = new Map<number, number>();
  for (let i = 0; i < rows; i++) if (wanted.has(numbers[i]!)) places.set(numbers[i]!, i);
  const source = (row: number): DuplicatePair['better'] => {
    const i = places.get(row)!;
    const number = (name: string) => (columns[name] as Float64Array | undefined)?.[i] ?? NaN;
    const names = columns['name'] as TextColumn | undefined;
    const signal = number('signalToNoise');
    return {
      row,
      name: (names && textAt(names, i).trim()) || null,
      raDeg: number('raDeg'),
      decDeg: number('decDeg'),
      velocityKms: number('czKms'),
      signalToNoise: Number.isNaN(signal) ? null : signal,
    };
  };
  return duplicates.map(({ row, of, separationArcsec, differenceKms }) => ({
    better: source(of),
    other: source(row),
    separationArcsec,
    differenceKms,
  }));
}
