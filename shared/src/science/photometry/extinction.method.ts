import type { MethodEntry } from '../method-entry.ts';

export const extinction: MethodEntry = {
  id: 'extinction',
  title: 'Galactic extinction',
  summary:
    'Dust in the Galaxy dims what lies behind it. Where it is strong, optical and ultraviolet silence is not testable.',
  formulas: [String.raw`A_b = R_b\,E(B-V)`],
  symbols: [
    [String.raw`A_{b}`, 'extinction in the band', 'mag'],
    [String.raw`R_{b}`, 'coefficient of the band for R_{V} = 3.1; r 2.285, Ks 0.310', ''],
    [String.raw`E(B-V)`, 'reddening, on the original scale of the 1998 maps', 'mag'],
  ],
  criteria: ['absence.maximumReddeningMag', 'absence.minimumLatitudeDeg'],
  columns: ['extinctionMag'],
  functions: ['photometry/extinction#extinction'],
  validity:
    'The coefficients already hold the recalibration by 14 per cent: a column that is recalibrated must not be used with them again. Without a reddening the extinction is taken as zero and the grounds say so.',
  sources: ['Schlafly & Finkbeiner (2011), ApJ 737, 103'],
};
