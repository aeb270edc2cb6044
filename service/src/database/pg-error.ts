/** SQLSTATE of a database error, also where Drizzle wrapped it; undefined for other errors. */
function sqlState(error: unknown): string | undefined {
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    const { code } = cause as Error & { code?: unknown };
    if (typeof code === 'string' && /^[0-9A-Z]{5}$/.test(code)) return code;
  }
  return undefined;
}

export const isUniqueViolation = (error: unknown): boolean => sqlState(error) === '23505';
