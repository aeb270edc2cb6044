import type { MethodEntry } from '../method-entry.ts';

export const stability: MethodEntry = {
  id: 'stability',
  title: 'Stability',
  summary:
    'The verdict is repeated with what it holds fixed drawn from its errors: distance, positions, depth, scatter of the relation. The share of draws that keep it is its stability; what flips it is said.',
  formulas: [
    String.raw`\hat p = \frac{k}{n}, \qquad \frac{\hat p + z^2/2n \pm z\sqrt{\hat p(1-\hat p)/n + z^2/4n^2}}{1 + z^2/n}, \quad z = 1.96`,
  ],
  symbols: [
    [String.raw`k`, 'draws with the stated verdict', ''],
    [String.raw`n`, 'draws', ''],
  ],
  criteria: ['robustness.draws', 'robustness.seed'],
  columns: ['robustness'],
  functions: ['robustness/stability#stability', 'robustness/intervals#wilsonInterval'],
  validity:
    'With 2000 draws the standard error at p = 0.5 is 0.011. The same seed gives the same numbers. It measures what errors do to the verdict, not whether the model is right.',
  sources: ['Wilson (1927), J. Am. Stat. Assoc. 22, 209'],
};
