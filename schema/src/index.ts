export * from './tables/people.ts';
export * from './tables/surveys.ts';
export * from './tables/runs.ts';
export * from './tables/decisions.ts';
export * from './tables/editions.ts';
export * from './tables/observations.ts';
