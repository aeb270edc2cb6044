/**
 * Palettes of images, from dark to bright, every tenth of the way. All rise evenly in lightness, so that they read the same
 * with any colour vision. Source: viridis by van der Walt & Smith (2015, CC0); cividis by Nuñez, Anderton & Renslow
 * (2018), PLoS ONE 13, e0199239.
 */
const ANCHORS = {
  grey: ['000000', 'ffffff'],
  cividis: ['00224e', '123570', '3b496c', '575d6d', '707173', '8a8678', 'a59c74', 'c3b369', 'e1cc55', 'fee838'],
  viridis: ['440154', '482878', '3e4989', '31688e', '26828e', '1f9e89', '35b779', '6ece58', 'b5de2b', 'fde725'],
} as const;

export type ColourMap = keyof typeof ANCHORS;
export const COLOUR_MAPS = Object.keys(ANCHORS) as ColourMap[];

const channel = (hex: string, k: number) => parseInt(hex.slice(2 * k, 2 * k + 2), 16);

/** 256 colours as bytes red, green, blue in turn. */
export function colourTable(name: ColourMap, isInverse: boolean): Uint8ClampedArray {
  const anchors = ANCHORS[name];
  const table = new Uint8ClampedArray(256 * 3);
  for (let i = 0; i < 256; i++) {
    const at = ((isInverse ? 255 - i : i) / 255) * (anchors.length - 1);
    const below = Math.min(anchors.length - 2, Math.floor(at));
    for (let k = 0; k < 3; k++) {
      const [a, b] = [channel(anchors[below]!, k), channel(anchors[below + 1]!, k)];
      table[3 * i + k] = a + (b - a) * (at - below);
    }
  }
  return table;
}
