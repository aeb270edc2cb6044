/**
 * What is said of one method, to whoever asks: the methods page shows it, grounds name its `id`, and the functions that
 * carry it out name it in their docstrings. It stands beside them, so that formula and code change together.
 */
export interface MethodEntry {
  id: string;
  title: string;
  /** What it is for, in a sentence or two. */
  summary: string;
  /** TeX, one a line. */
  formulas: string[];
  /** Symbol in TeX, meaning, unit. */
  symbols: [symbol: string, meaning: string, unit: string][];
  /** Criteria it takes, as `section.key`. */
  criteria: string[];
  /** Columns and fields of verdicts that it makes. */
  columns: string[];
  /** Functions that carry it out, as `room/file#function`. */
  functions: string[];
  /** Where it holds, and what it cannot say. */
  validity: string;
  sources: string[];
}
