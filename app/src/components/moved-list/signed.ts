/** A difference with its sign and sensible digits: `+14.9`, `−0.21`. */
export function signed(value: number): string {
  const size = Math.abs(value);
  const digits = size >= 100 ? 0 : size >= 1 ? 1 : size >= 0.1 ? 2 : 3;
  return `${value < 0 ? '−' : '+'}${size.toFixed(digits)}`;
}
