import { describe, expect, it } from 'vitest';
import { decisionChanges } from './decision-changes.ts';
import type { StoredDecisions } from './run-inputs.ts';

const stored = (given: Partial<StoredDecisions> = {}): StoredDecisions => ({
  cosmology: { h0: 70, omegaM: 0.3 },
  overrides: [],
  distances: [],
  ...given,
});
const hi = { detectionCatalogueId: 'hi', detectionRow: 4 };
const distance = (distanceMpc: number) => ({ ...hi, distanceMpc, errorMpc: 1, source: 'TRGB' });
const word = (action: string) => ({ ...hi, catalogueId: 'deep', row: 7, action });

describe('people’s words between two runs', () => {
  it('did not change where they are the same', () => {
    const same = stored({ distances: [distance(9.4)], overrides: [word('reject')] });
    expect(decisionChanges(same, structuredClone(same))).toEqual([]);
  });

  it('are named with the row of the HI list they belong to', () => {
    const to = stored({ distances: [distance(9.4)], overrides: [word('reject')] });
    expect(decisionChanges(stored(), to)).toEqual([
      { catalogueId: 'hi', row: 4, change: 'distance replaced: the table’s -> 9.4 Mpc (TRGB)' },
      { catalogueId: 'hi', row: 4, change: 'counterpart rejected: row 7' },
    ]);
    expect(decisionChanges(to, stored()).map(({ change }) => change)).toEqual([
      'distance replaced: 9.4 Mpc (TRGB) -> the table’s',
      'word on row 7 taken back',
    ]);
    const other = stored({ distances: [distance(11)], overrides: [word('accept')] });
    expect(decisionChanges(to, other).map(({ change }) => change)).toEqual([
      'distance replaced: 9.4 Mpc (TRGB) -> 11.0 Mpc (TRGB)',
      'counterpart accepted: row 7',
    ]);
  });

  it('tell a changed cosmology of the whole survey', () => {
    expect(decisionChanges(stored(), stored({ cosmology: { h0: 73, omegaM: 0.3 } }))).toEqual([
      { catalogueId: null, row: null, change: 'cosmology h0 70 -> 73' },
    ]);
  });
});
