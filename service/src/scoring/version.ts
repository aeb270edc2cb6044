/** Part of every run's input hash: raise it when the same input may give other numbers. */
export const SCORING_VERSION = 'scoring-3';
