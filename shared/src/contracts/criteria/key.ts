import type { z } from 'zod';

/** What a setting says of itself: the form, the API page and the methods page are made of it. */
export interface KeyFacts {
  title: string;
  unit: string;
  /** What it does, in a sentence. */
  description: string;
  /** Where the default comes from. */
  source: string;
  /** Words of the values of an enum, for people; the values themselves are what is kept and sent. */
  choices?: Record<string, string>;
}
/** A setting with its facts. */
export const key = <T extends z.ZodType>(schema: T, facts: KeyFacts): T => schema.meta({ ...facts }) as T;
export const PRACTICE = 'common practice';
export const OWN = 'choice of this project; a setting';
