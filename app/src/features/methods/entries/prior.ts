import type { MethodEntry } from '../method-entry.ts';

export const prior: MethodEntry = {
  id: 'prior',
  title: 'Prior share with a galaxy of stars',
  summary:
    'Q is how many HI detections have a galaxy of stars before one looks. Where a bin of gas mass holds enough detections it is learnt from the run itself; else it is that of the criteria.',
  formulas: ['Q ← mean of Q a_{i} / (Q a_{i} + 1 − Q)', 'a_{i} = (1 − c_{i}) + Σ_{j} x_{ij}'],
  symbols: [
    ['Q', 'prior share with a counterpart', ''],
    ['a_{i}', 'how many times likelier the data of detection i are with a counterpart than without', ''],
    ['c_{i}', 'power: chance that the counterpart would have been seen', ''],
    ['x_{ij}', 'weight of object j for a prior of one', ''],
  ],
  criteria: ['counterpart.priorFraction', 'counterpart.learnPrior', 'counterpart.priorWithoutDistance'],
  validity:
    'Learnt in bins of half a decade with a hundred detections or more, the fallback counting as twenty, iterated to 1e-6. P(none) follows the prior closely near the threshold: the detection’s page shows it at other priors, and 0.97, 0.986 and 0.995 span published base rates.',
  sources: [
    'O’Beirne et al. (2025), WALLABY pilot: 1 to 3 per cent without',
    'expectation maximisation over the run (our choice)',
  ],
};
