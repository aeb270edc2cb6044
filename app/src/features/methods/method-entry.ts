/** What the methods page says of one method; `id` is what grounds name in their `method`. */
export interface MethodEntry {
  id: string;
  title: string;
  /** What it is for, in a sentence or two. */
  summary: string;
  /** One a line; `_{…}` and `^{…}` set low and high. */
  formulas: string[];
  /** Symbol, meaning, unit. */
  symbols: [symbol: string, meaning: string, unit: string][];
  /** Criteria it takes, as `section.key`. */
  criteria: string[];
  /** Where it holds, and what it cannot say. */
  validity: string;
  sources: string[];
}
