import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { Coverage } from '@eremite/shared/drawing/uncovered-cells';
import type { EditionHead, EditionWords } from '../edition-head.ts';

export interface DossierSource {
  rank: number;
  priority: number;
  detail: VerdictDetail;
  words: EditionWords;
}

/** All a dossier is made of, as plain data: it is made in a thread. */
export interface DossierInput {
  head: EditionHead;
  methods: string;
  archiveSha256: string | null;
  coverages: Coverage[];
  sources: DossierSource[];
}
