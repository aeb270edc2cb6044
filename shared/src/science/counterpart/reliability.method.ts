import type { MethodEntry } from '../method-entry.ts';

export const reliability: MethodEntry = {
  id: 'reliability',
  title: 'Reliability of the line',
  summary:
    'A share of the lines in a list is not real. Lists of dark detections concentrate the false ones, so that the reliability enters the probabilities as a hypothesis of its own.',
  formulas: [
    String.raw`P(\text{spurious}) = (1-R)/S`,
    String.raw`S = R\,\Big[(1-Q) + Q\,(1-c) + \sum_j X_j\Big] + (1-R)`,
  ],
  symbols: [
    [String.raw`R`, 'reliability of the detection, from the table', ''],
    [String.raw`Q`, 'prior share with a counterpart', ''],
    [String.raw`c`, 'power', ''],
    [String.raw`X_{j}`, 'weight of object j', ''],
  ],
  criteria: ['doubts.minimumReliability'],
  columns: ['pSpurious'],
  functions: ['counterpart/exclusive#exclusiveProbabilities', 'doubts/spurious-line#spuriousLine'],
  validity:
    'Without a reliability in the table R is one and the grounds say so. Example: with c = 0.996, Q = 0.986 and R = 0.98, P(none) is 0.37, P(missed) 0.10 and P(spurious) 0.53.',
  sources: ['joint hypotheses of this project, after Sutherland & Saunders (1992)'],
};
