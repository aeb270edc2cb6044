import type { MethodEntry } from '../method-entry.ts';

export const reliability: MethodEntry = {
  id: 'reliability',
  title: 'Reliability of the line',
  summary:
    'A share of the lines in a list is not real. Lists of dark detections concentrate the false ones, so that the reliability enters the probabilities as a hypothesis of its own.',
  formulas: ['P(spurious) = (1 − R) / S', 'S = R [(1 − Q) + Q (1 − c) + Σ_{j} X_{j}] + (1 − R)'],
  symbols: [
    ['R', 'reliability of the detection, from the table', ''],
    ['Q', 'prior share with a counterpart', ''],
    ['c', 'power', ''],
    ['X_{j}', 'weight of object j', ''],
  ],
  criteria: ['doubts.minimumReliability'],
  validity:
    'Without a reliability in the table R is one and the grounds say so. Example: with c = 0.996, Q = 0.986 and R = 0.98, P(none) is 0.37, P(missed) 0.10 and P(spurious) 0.53.',
  sources: ['joint hypotheses of this project, after Sutherland & Saunders (1992)'],
};
