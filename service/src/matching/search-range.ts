/** The part of the queries a call of a kernel works on, and how much it may find. */
export interface SearchRange {
  /** first query searched, 0 unless given */
  from?: number;
  /** one past the last query searched, all unless given */
  to?: number;
  /** most hits allowed */
  limit?: number;
}
