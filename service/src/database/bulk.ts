export type BulkType = 'uuid' | 'int4' | 'int8' | 'float8' | 'text' | 'bytea' | 'jsonb';

export interface BulkColumn {
  readonly name: string;
  readonly type: BulkType;
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
