import type { TeamRole } from '@eremite/shared/contracts/words';

/** Whether a role may change the survey: tables, criteria, runs, people. */
export const mayLead = (role: TeamRole): boolean => role === 'lead';
/** Whether a role may decide on detections: reviews, overrides, distances. */
export const mayReview = (role: TeamRole): boolean => role === 'lead' || role === 'reviewer';
