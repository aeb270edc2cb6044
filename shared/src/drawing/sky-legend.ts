import type { SkyMark } from './sky-mark.ts';

/** What shapes and filling mean, in the order of the legend. */
export const SKY_LEGEND: readonly { word: string; mark: Pick<SkyMark, 'kind' | 'isStar' | 'agreement'> }[] = [
  { word: 'optical', mark: { kind: 'optical', isStar: false, agreement: 'none' } },
  { word: 'infrared', mark: { kind: 'infrared', isStar: false, agreement: 'none' } },
  { word: 'ultraviolet', mark: { kind: 'ultraviolet', isStar: false, agreement: 'none' } },
  { word: 'continuum', mark: { kind: 'continuum', isStar: false, agreement: 'none' } },
  { word: 'gas', mark: { kind: 'hi', isStar: false, agreement: 'none' } },
  { word: 'star', mark: { kind: 'optical', isStar: true, agreement: 'none' } },
  { word: 'velocity agrees', mark: { kind: 'optical', isStar: false, agreement: 'concordant' } },
  { word: 'velocity differs', mark: { kind: 'optical', isStar: false, agreement: 'other' } },
];
