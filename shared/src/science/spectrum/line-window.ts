export interface LineGuess {
  readonly centreKms: number;
  readonly widthKms: number;
}

/**
 * Velocities that a line of a given W50 may fill: twice as wide and a half for narrow lines, which may be Gaussian, and
 * 100 km/s beyond either flank at most. Three channels at least.
 */
export function lineWindow(centreKms: number, widthKms: number, channelKms: number) {
  const half = Math.max(Math.min(1.25 * widthKms, widthKms / 2 + 100), 3 * channelKms) + channelKms;
  return { lowKms: centreKms - half, highKms: centreKms + half };
}

/** Boxes tried, channels. */
const BOXES = [3, 5, 8, 12, 18, 27, 40, 60, 90];
/** A line is looked for this far from a catalogue's velocity, km/s. */
const REACH_KMS = 150;

/**
 * Where the line is, roughly: as a catalogue says, or else the box of channels that stands out most.
 *
 * @param known what a catalogue says, km/s
 */
export function firstGuess(
  v: Float64Array,
  flux: Float64Array,
  channelKms: number,
  known: { readonly centreKms?: number | undefined; readonly widthKms?: number | undefined },
): LineGuess {
  if (known.centreKms !== undefined && known.widthKms !== undefined) {
    return { centreKms: known.centreKms, widthKms: Math.max(known.widthKms, 2 * channelKms) };
  }
  const sorted = [...flux].filter(Number.isFinite).sort((a, b) => a - b);
  const middle = sorted[sorted.length >> 1] ?? 0;
  let best = { score: -Infinity, centreKms: known.centreKms ?? v[v.length >> 1]!, widthKms: 5 * channelKms };
  for (const box of BOXES.filter((size) => size < v.length / 3)) {
    for (let from = 0; from + box <= v.length; from++) {
      const centreKms = (v[from]! + v[from + box - 1]!) / 2;
      if (known.centreKms !== undefined && Math.abs(centreKms - known.centreKms) > REACH_KMS) continue;
      let sum = 0;
      for (let i = from; i < from + box; i++) sum += Number.isFinite(flux[i]!) ? flux[i]! - middle : 0;
      const score = sum / Math.sqrt(box);
      if (score > best.score) best = { score, centreKms, widthKms: box * channelKms };
    }
  }
  return { centreKms: best.centreKms, widthKms: known.widthKms ?? best.widthKms };
}
