import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { EditionOverride, EditionReview, editionDoubtWord, editionInput } from '@eremite/shared/contracts/edition';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Run } from '@eremite/shared/contracts/run';
import type { z } from 'zod';
import type { EngineInput } from '../scoring/engine-input.ts';

/** A table the run read, with what is needed to read its file again in the same way. */
export interface HeadInput extends z.output<typeof editionInput> {
  /** As a person wrote them; whatever they leave open takes its default. */
  settings: IntakeSettings;
  withVelocity: number;
}

/** What an edition says of itself, as it stood when it was frozen: kept with the edition and written into its archive. */
export interface EditionHead {
  survey: { id: string; name: string; description: string; team: string; cosmology: EngineInput['survey'] };
  number: number;
  note: string;
  frozenBy: string;
  frozenAt: string;
  supersedes: number | null;
  criteria: { id: string; number: number; note: string; settings: CriteriaSettings };
  run: Pick<Run, 'id' | 'number' | 'inputHash' | 'notes' | 'control'> & {
    detections: number;
    scoringVersion: string;
    startedBy: string;
  };
  /** People's words that the run took up. */
  decisions: EngineInput['decisions'];
  inputs: HeadInput[];
  /** Last line of the survey's ledger before the edition. */
  ledgerHead: { number: number; hash: string };
  software: { version: string; node: string };
}

/** What people said of one detection of an edition. */
export interface EditionWords {
  reason: string;
  nullResult: string;
  said: EditionReview[];
  overrides: EditionOverride[];
  doubtWords: z.output<typeof editionDoubtWord>[];
}
