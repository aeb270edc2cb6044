import type { MethodEntry } from '../method-entry.ts';

export const prior: MethodEntry = {
  id: 'prior',
  title: 'Prior share with a galaxy of stars',
  summary:
    'Q is how many HI detections have a galaxy of stars before one looks. Where a bin of gas mass holds enough detections it is learnt from the run itself; else it is that of the criteria.',
  formulas: [
    String.raw`Q \leftarrow \left\langle \frac{Q\,a_i}{Q\,a_i + 1 - Q} \right\rangle_i`,
    String.raw`a_i = (1 - c_i) + \sum_j x_{ij}`,
  ],
  symbols: [
    [String.raw`Q`, 'prior share with a counterpart', ''],
    [String.raw`a_{i}`, 'how many times likelier the data of detection i are with a counterpart than without', ''],
    [String.raw`c_{i}`, 'power: chance that the counterpart would have been seen', ''],
    [String.raw`x_{\mathrm{ij}}`, 'weight of object j for a prior of one', ''],
  ],
  criteria: ['counterpart.priorFraction', 'counterpart.learnPrior', 'counterpart.priorWithoutDistance'],
  columns: ['priors'],
  functions: ['counterpart/learn-prior#learnPrior'],
  validity:
    'Learnt in bins of half a decade with a hundred detections or more, the fallback counting as twenty, iterated to 1e-6. P(none) follows the prior closely near the threshold: the detection’s page shows it at other priors, and 0.97, 0.986 and 0.995 span published base rates.',
  sources: [
    'O’Beirne et al. (2025), WALLABY pilot: 1 to 3 per cent without',
    'expectation maximisation over the run (our choice)',
  ],
};
