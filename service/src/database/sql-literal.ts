type Literal = string | number | readonly (string | number)[];

function literal(value: Literal): string {
  if (typeof value === 'string') return `'${value.replaceAll("'", "''")}'`;
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new Error(`not a number SQL can carry: ${value}`);
    return String(value);
  }
  return value.length === 0 ? `'{}'` : `array[${value.map(literal).join(',')}]`;
}

/**
 * A query with its values written in, for statements that take no parameters (COPY). Standard strings are assumed
 * (`standard_conforming_strings`, on by default), so only the quote needs doubling.
 */
export function withLiterals(sql: string, params: readonly Literal[]): string {
  return sql.replace(/\$(\d+)/g, (_, number: string) => {
    const value = params[Number(number) - 1];
    if (value === undefined) throw new Error(`no value for $${number}`);
    return literal(value);
  });
}
