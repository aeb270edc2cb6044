/** @returns `values` at the indices, in their order */
export function gather<T extends Uint32Array | Float64Array>(values: T, indices: Uint32Array): T {
  const gathered = new (values.constructor as new (length: number) => T)(indices.length);
  for (let i = 0; i < indices.length; i++) gathered[i] = values[indices[i]!]!;
  return gathered;
}
