import type { BandId } from '../photometry/bands.ts';

/** Colour m_band - m_r (AB) of a population and its scatter, per band; a band left out is not predicted. */
export type DwarfColours = Readonly<Partial<Record<BandId, { minusR: number; scatterMag: number }>>>;

const optical = (minusR: number, scatterMag = 0.2) => ({ minusR, scatterMag });

/**
 * Typical colours of gas-rich, star-forming dwarfs, AB, without dust. From memory; configurable, and refitted from a
 * survey's own secure matches where there are enough.
 *
 * Near infrared and W1, W2: from M/L = 0.6 against 0.75 in r. W3 and W4 are left out: warm dust of a metal-poor dwarf
 * cannot be predicted, so a catalogue silent there says nothing.
 */
export const DWARF_COLOURS: DwarfColours = {
  FUV: optical(2, 0.8),
  NUV: optical(1.6, 0.7),
  u: optical(1.2, 0.3),
  g: optical(0.35),
  r: optical(0, 0),
  i: optical(-0.15),
  z: optical(-0.2),
  B: optical(0.5),
  V: optical(0.15, 0.1),
  R: optical(-0.03, 0.1),
  I: optical(-0.17),
  G: optical(0.05, 0.3),
  'PS1 g': optical(0.33),
  'PS1 r': optical(0, 0.05),
  'PS1 i': optical(-0.15),
  'PS1 z': optical(-0.2),
  'PS1 y': optical(-0.22),
  'DES g': optical(0.34),
  'DES r': optical(-0.03, 0.05),
  'DES i': optical(-0.16),
  'DES z': optical(-0.2),
  'LSST g': optical(0.34),
  'LSST r': optical(0, 0.05),
  'LSST i': optical(-0.15),
  J: optical(-0.25, 0.4),
  H: optical(-0.3, 0.4),
  Ks: optical(0.2, 0.5),
  W1: optical(1.03, 0.5),
  W2: optical(1.65, 0.5),
};
