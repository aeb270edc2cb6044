/** What the proxy asks of the thread that owns the database. */
export type PgliteRequest =
  | { op: 'query'; sql: string; params: unknown[]; rowMode: 'array' | 'object'; rawTypes: number[] }
  | { op: 'exec'; sql: string }
  | { op: 'copyIn'; sql: string; bytes: Uint8Array<ArrayBuffer> }
  | { op: 'copyOut'; sql: string }
  | { op: 'dump' }
  | { op: 'close' };

export interface PgliteStart {
  /** Directory, or undefined for a database in memory. */
  readonly directory: string | undefined;
  /** Archive of a data directory to begin with. */
  readonly template: string | undefined;
}

export type PgliteAnswer =
  { id: number; value: unknown } | { id: number; error: { message: string; fields: Record<string, unknown> } };
