import type { MethodEntry } from '../method-entry.ts';

export const control: MethodEntry = {
  id: 'control',
  title: 'Shifted positions',
  summary:
    'The match is repeated at shifted places with the same coverage and masks: what is accepted there is accepted by chance.',
  formulas: [
    String.raw`\text{observed} = \text{true} + (1 - \text{true}) \times \text{chance}`,
    String.raw`\text{true} = (\text{observed} - \text{chance}) / (1 - \text{chance})`,
  ],
  symbols: [
    [
      String.raw`\mathrm{chance}`,
      'share of shifted places at which an object would be accepted; interval of 68 per cent',
      '',
    ],
  ],
  criteria: ['control.offsetsPerSource'],
  columns: ['control'],
  functions: ['robustness/control#chanceFraction', 'robustness/control#correctedCounts'],
  validity:
    'Places outside coverage or on another detection are left out. The corrected count of detections without an object allows for those hidden by chance objects.',
  sources: ['Gehrels (1986), ApJ 303, 336, Poisson intervals'],
};
