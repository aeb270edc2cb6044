import type { CriteriaSettings } from '../contracts/criteria.ts';
import type { VerdictDetail } from '../contracts/verdict.ts';
import { toSkyMarks, type SkyMark } from './sky-mark.ts';
import type { Coverage } from './uncovered-cells.ts';

/** What a picture needs of a verdict; a preview has it too. */
export type DrawnDetail = Omit<VerdictDetail, 'runId' | 'runNumber' | 'criteriaNumber'>;

/** One detection as it is drawn. */
export interface DrawnEvidence {
  detail: DrawnDetail;
  /** Criteria of the run: they give the windows and zones. */
  settings: CriteriaSettings;
  /** Footprints of the searched catalogues; without them nothing is hatched. */
  coverages?: readonly Coverage[] | undefined;
  /** Objects to draw in place of the candidates and neighbours of the verdict. */
  marks?: readonly SkyMark[] | undefined;
}

/** The objects of the evidence: those given, else candidates and neighbours. */
export const marksOf = ({ detail, settings, marks }: DrawnEvidence): readonly SkyMark[] =>
  marks ?? toSkyMarks(detail.candidates, detail.neighbours, settings.surroundings.velocityWindowKms);
