const BLOCK = 2880;

/** A FITS image of 16-bit integers, value = BSCALE × stored, about a position: north up, east left. */
export function fitsImage(
  { pixels, pixelArcsec, raDeg, decDeg }: { pixels: number; pixelArcsec: number; raDeg: number; decDeg: number },
  values: ArrayLike<number>,
  scale: number,
  more: Record<string, string | number>,
): Buffer {
  const cards: Record<string, string | number | boolean> = {
    SIMPLE: true,
    BITPIX: 16,
    NAXIS: 2,
    NAXIS1: pixels,
    NAXIS2: pixels,
    BSCALE: scale,
    BZERO: 0,
    CTYPE1: 'RA---TAN',
    CTYPE2: 'DEC--TAN',
    CRPIX1: (pixels + 1) / 2,
    CRPIX2: (pixels + 1) / 2,
    CRVAL1: raDeg,
    CRVAL2: decDeg,
    CDELT1: -pixelArcsec / 3600,
    CDELT2: pixelArcsec / 3600,
    RADESYS: 'ICRS',
    ...more,
  };
  const lines = Object.entries(cards).map(([keyword, value]) => {
    const text = typeof value === 'string' ? `'${value}'` : value === true ? 'T' : String(value);
    return `${keyword.padEnd(8)}= ${text.padStart(20)}`.padEnd(80);
  });
  const head = [...lines, 'END'.padEnd(80)].join('');
  const data = Buffer.alloc(Math.ceil((values.length * 2) / BLOCK) * BLOCK);
  for (let i = 0; i < values.length; i++) {
    data.writeInt16BE(Math.max(-32_767, Math.min(32_767, Math.round(values[i]! / scale))), 2 * i);
  }
  return Buffer.concat([Buffer.from(head.padEnd(Math.ceil(head.length / BLOCK) * BLOCK)), data]);
}
