/** The shortest decimal text that reads back as the same 32-bit float. */
export function floatText(value: number): string {
  if (!Number.isFinite(value)) return String(value);
  for (let digits = 6; digits < 9; digits++) {
    const short = Number(value.toPrecision(digits));
    if (Math.fround(short) === value) return String(short);
  }
  return String(value);
}
