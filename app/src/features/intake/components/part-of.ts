/** File of a catalogue of several that a row is in. */
export const partOf = (parts: readonly { fileName: string; firstRow: number }[], row: number): string =>
  parts.findLast(({ firstRow }) => firstRow <= row)?.fileName ?? '';
