import type { OutputCell, OutputColumn, OutputRows } from '../../tables/writers/output-column.ts';

/** A column of an exported table together with how its cell is got from a line. */
export type TableColumn<Line> = OutputColumn & { cell: (line: Line) => OutputCell };

/** A table on its way out, in whatever format is asked for. */
export interface TableAnswer {
  columns: OutputColumn[];
  rows: OutputRows;
  description: string;
}

type More = Omit<OutputColumn, 'name' | 'datatype' | 'description' | 'unit'>;

export const text = <Line>(
  name: string,
  description: string,
  cell: TableColumn<Line>['cell'],
  more: More = {},
): TableColumn<Line> => ({ name, datatype: 'text', description, cell, ...more });

export const number = <Line>(
  name: string,
  unit: string,
  description: string,
  cell: TableColumn<Line>['cell'],
  more: More = {},
): TableColumn<Line> => ({ name, datatype: 'double', unit: unit || undefined, description, cell, ...more });

export const whole = <Line>(
  name: string,
  description: string,
  cell: TableColumn<Line>['cell'],
  more: More = {},
): TableColumn<Line> => ({ name, datatype: 'integer', description, cell, ...more });

/** Four decimals: priors are no better than that. */
export const probability = <Line>(
  name: string,
  description: string,
  cell: TableColumn<Line>['cell'],
  more: More = {},
): TableColumn<Line> => number(name, '', description, cell, { decimals: 4, ucd: 'stat.probability', ...more });

/** Lines as a table, a cell at a time, so that any number of them streams. */
export function tableOf<Line>(
  columns: readonly TableColumn<Line>[],
  lines: Iterable<Line> | AsyncIterable<Line>,
  description: string,
): TableAnswer {
  async function* rows() {
    for await (const line of lines) yield columns.map((column) => column.cell(line));
  }
  return { columns: columns.map(({ cell: _, ...column }) => column), rows: rows(), description };
}
