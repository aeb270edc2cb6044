import type { Survey, UpdateSurveyRequest } from '@eremite/shared/contracts/survey';

/** A survey's own words and numbers as they stand in the fields. */
export interface SurveyDraft {
  name: string;
  description: string;
  h0: string;
  omegaM: string;
}

export const EMPTY_DRAFT: SurveyDraft = { name: '', description: '', h0: '70', omegaM: '0.3' };

export const draftOf = ({ name, description, cosmology }: Survey): SurveyDraft => ({
  name,
  description,
  h0: String(cosmology.h0),
  omegaM: String(cosmology.omegaM),
});

export const requestOf = ({ name, description, h0, omegaM }: SurveyDraft): Required<UpdateSurveyRequest> => ({
  name,
  description,
  cosmology: { h0: Number(h0), omegaM: Number(omegaM) },
});
