const BLOCK = 2880;

type Card = string | number | boolean;

/** Bytes of a primary FITS array as a file has them, for tests of the readers. */
export function fitsBytes(cards: Readonly<Record<string, Card>>, data: Uint8Array = new Uint8Array(0)): Buffer {
  const lines = Object.entries({ SIMPLE: true, ...cards }).map(([keyword, value]) => {
    const text =
      typeof value === 'string' ? `'${value}'` : value === true ? 'T' : value === false ? 'F' : String(value);
    return `${keyword.padEnd(8)}= ${text.padStart(20)}`.padEnd(80);
  });
  const padded = (bytes: Buffer, fill: number) =>
    Buffer.concat([bytes, Buffer.alloc((BLOCK - (bytes.length % BLOCK)) % BLOCK, fill)]);
  return Buffer.concat([
    padded(Buffer.from([...lines, 'END'.padEnd(80)].join(''), 'latin1'), 0x20),
    padded(Buffer.from(data), 0),
  ]);
}

/** Big-endian single-precision values. */
export function floats(values: readonly number[]): Uint8Array {
  const view = new DataView(new ArrayBuffer(values.length * 4));
  values.forEach((value, i) => view.setFloat32(i * 4, value));
  return new Uint8Array(view.buffer);
}

/** Cards of a small TAN image of single-precision values about a position. */
export const tanCards = (width: number, height: number, raDeg = 150, decDeg = 2, stepDeg = 0.001) => ({
  BITPIX: -32,
  NAXIS: 2,
  NAXIS1: width,
  NAXIS2: height,
  CTYPE1: 'RA---TAN',
  CTYPE2: 'DEC--TAN',
  CRPIX1: (width + 1) / 2,
  CRPIX2: (height + 1) / 2,
  CRVAL1: raDeg,
  CRVAL2: decDeg,
  CDELT1: -stepDeg,
  CDELT2: stepDeg,
  RADESYS: 'ICRS',
});
