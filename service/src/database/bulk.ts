export type BulkType = 'uuid' | 'int4' | 'int8' | 'float8' | 'text' | 'bytea' | 'jsonb';

export interface BulkColumn {
  readonly name: string;
  readonly type: BulkType;
}

/** Rows already in PostgreSQL's binary COPY format, whole in themselves. */
export interface CopyPiece {
  readonly rows: number;
  readonly bytes: Uint8Array<ArrayBuffer>;
}

/** Large amounts of rows in and out by PostgreSQL's binary COPY, which both databases speak. */
export abstract class BulkStore {
  /**
   * Appends rows. Each piece of about 6 MB is committed by itself, so that other requests are served in between;
   * staged rows must be invisible until a later transaction says otherwise.
   *
   * @param rows batches of rows in column order; null is a missing value; int8 as number or bigint, jsonb as any value or as JsonText
   * @returns count of rows written
   */
  abstract copyInto(
    table: string,
    columns: readonly BulkColumn[],
    rows: AsyncIterable<readonly unknown[][]> | Iterable<readonly unknown[][]>,
  ): Promise<number>;

  /**
   * The same for rows that were encoded elsewhere, such as in another thread. A piece is spent once it has been taken:
   * its memory may be given away. The next is asked for while the one before is being written.
   */
  abstract copyPieces(table: string, columns: readonly BulkColumn[], pieces: AsyncIterable<CopyPiece>): Promise<number>;

  /**
   * Reads rows; bytea comes as Uint8Array, int8 as number, jsonb parsed.
   *
   * @param select a query with $1, $2...: uuid, text, numbers, and arrays of these
   * @param types of the columns of the answer, which the query must have exactly (cast where in doubt)
   * @returns batches of rows
   */
  abstract read(
    select: string,
    params: readonly (string | number | readonly (string | number)[])[],
    types: readonly BulkType[],
  ): AsyncIterable<unknown[][]>;
}
