import type { Column, NumberColumn, TextColumn } from './column-pack.ts';
import type { Scratch } from './scratch.ts';

/**
 * Joins the pieces of one column and puts every cell in its place in one go: the pieces are read from end to end and
 * written to a few hundred places that each run on, which memory serves far better than picking cells from all over.
 *
 * @param pieces of one type, in order
 * @param places for each cell of the pieces, where it goes: a permutation
 * @param scratch where the sorted cells lie
 */
export function scatterColumn(pieces: readonly Column[], places: Uint32Array, scratch: Scratch): Column {
  const first = pieces[0]!;
  if ('kind' in first) return scatterText(pieces as readonly TextColumn[], places, scratch);
  if (first instanceof Float64Array) return scatterFloats(pieces as readonly Float64Array[], places, scratch);
  return scatterOthers(pieces as readonly NumberColumn[], places, scratch);
}

// Most cells are of this type; a function of its own lets the compiler know that.
function scatterFloats(pieces: readonly Float64Array[], places: Uint32Array, scratch: Scratch): Float64Array {
  const sorted = new Float64Array(scratch.take(8 * places.length), 0, places.length);
  let k = 0;
  for (const values of pieces) for (let i = 0; i < values.length; i++) sorted[places[k++]!] = values[i]!;
  return sorted;
}

function scatterOthers<T extends NumberColumn>(pieces: readonly T[], places: Uint32Array, scratch: Scratch): T {
  const type = pieces[0]!.constructor as new (buffer: ArrayBuffer, at: number, length: number) => T;
  const sorted = new type(scratch.take(pieces[0]!.BYTES_PER_ELEMENT * places.length), 0, places.length);
  let k = 0;
  for (const values of pieces) for (let i = 0; i < values.length; i++) sorted[places[k++]!] = values[i]!;
  return sorted;
}

function scatterText(pieces: readonly TextColumn[], places: Uint32Array, scratch: Scratch): TextColumn {
  const offsets = new Uint32Array(scratch.take(4 * (places.length + 1)), 0, places.length + 1);
  offsets[0] = 0;
  let k = 0;
  for (const { offsets: own } of pieces) {
    for (let i = 1; i < own.length; i++) offsets[places[k++]! + 1] = own[i]! - own[i - 1]!;
  }
  for (let i = 1; i < offsets.length; i++) offsets[i]! += offsets[i - 1]!;
  const bytes = new Uint8Array(scratch.take(offsets[places.length]!), 0, offsets[places.length]!);
  k = 0;
  for (const { offsets: own, bytes: text } of pieces) {
    for (let i = 1; i < own.length; i++) {
      let to = offsets[places[k++]!]!;
      // Identifiers are short: for a few bytes a loop is faster than a call.
      const [from, end] = [own[i - 1]!, own[i]!];
      if (end - from > 64) bytes.set(text.subarray(from, end), to);
      else for (let at = from; at < end; at++) bytes[to++] = text[at]!;
    }
  }
  return { kind: 'text', offsets, bytes };
}
