/** Plain SQL on the database, for what does not speak Drizzle. */
export interface SqlClient {
  /** Several statements are allowed when there are no values. */
  executeSql(text: string, values?: unknown[]): Promise<{ rows: never[] }>;
}

/** Injection token of the {@link SqlClient}. */
export const SQL_CLIENT = Symbol('SQL_CLIENT');
