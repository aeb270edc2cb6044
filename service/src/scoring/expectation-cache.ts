import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import type { Detection } from './detection-table.ts';
import { type BandExpectation, expectIn } from './expectation.ts';
import type { PreparedBand } from './prepared-catalogue.ts';

/** Expectations of a detection by band, each made once. */
export class ExpectationCache {
  private readonly byBand = new Map<PreparedBand, BandExpectation | undefined>();
  constructor(
    private readonly detection: Detection,
    private readonly relation: GasStarRelation,
  ) {}

  in(band: PreparedBand): BandExpectation | undefined {
    if (!this.byBand.has(band)) this.byBand.set(band, expectIn(this.detection, band, this.relation));
    return this.byBand.get(band);
  }
}
