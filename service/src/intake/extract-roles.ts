import type { SettingsQuestion, SidelinedRow } from '@eremite/shared/contracts/intake';
import { SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import type { ColumnFacts, RowChunk } from '../tables/table.ts';
import type { Column, PackedColumns, TextColumn } from '../tiles/column-pack.ts';
import { selectRows } from '../tiles/column-rows.ts';
import { CellTally } from './cell-tally.ts';
import { RowKeeper } from './keep-rows.ts';
import { lineOf, numberCells, type NumberRecipe, rowOf } from './number-cells.ts';
import { sigmaOfError } from '@eremite/shared/science/counterpart/position-error';
import { chunkPositions, type ChunkPositions, DecimalRightAscensions } from './positions.ts';
import { type Recipe, recipeOf } from './recipe.ts';
import type { ResolvedSettings } from './resolved.ts';
import { nameCells } from './text-cells.ts';
import { toBarycentricCz, toOpticalWidths, toVelocityFlux } from './velocities.ts';

/** What has become of the rows of one chunk. */
export interface ExtractedChunk {
  /** The usable rows, in file order: see tiles/role-table.ts. */
  roles: PackedColumns;
  /** Their places in the chunk (0-based). */
  kept: Uint32Array;
  /** Rows that could not be used; `index` is their place in the chunk, null for a row that is no row. */
  sidelined: { row: SidelinedRow; index: number | null; text?: string }[];
  /** Rows that the settings leave out. */
  leftOut: number;
}

/**
 * Turns chunks of a table into role tables under resolved settings: positions ICRS, cz optical and barycentric, errors
 * 1-D, units canonical. Only a row without a usable position is put aside; any other cell that cannot be used is
 * missing. Keeps count over all chunks.
 */
export class RoleExtractor {
  readonly decimals = new DecimalRightAscensions();
  private readonly recipe: Recipe;
  private readonly tally = new CellTally();
  private readonly keeper: RowKeeper;

  constructor(
    private readonly resolved: ResolvedSettings,
    columns: readonly ColumnFacts[],
  ) {
    this.recipe = recipeOf(resolved, columns);
    this.keeper = new RowKeeper(this.recipe.keep);
  }

  extract(chunk: RowChunk): ExtractedChunk {
    const wanted = this.keeper.keep(chunk);
    const { recipe } = this;
    const positions = chunkPositions(chunk, recipe.position, recipe.marks, this.decimals, this.tally);
    const sidelined: ExtractedChunk['sidelined'] = [];
    const kept = new Uint32Array(chunk.rows);
    let count = 0;
    let leftOut = 0;
    for (let i = 0; i < chunk.rows; i++) {
      if (wanted && wanted[i] === 0) leftOut++;
      else if (Number.isNaN(positions.raDeg[i]!)) {
        const { column, value, reason } = positions.faults.get(i)!;
        sidelined.push({ index: i, row: { row: rowOf(chunk, i), line: lineOf(chunk, i), column, value, reason } });
      } else kept[count++] = i;
    }
    for (const { row, line, reason, text } of chunk.broken ?? []) {
      sidelined.push({
        index: null,
        text,
        row: { row, line: line || null, column: null, value: text.slice(0, 200), reason },
      });
    }
    sidelined.sort((a, b) => a.row.row - b.row.row);
    const indices = kept.slice(0, count);
    const roles = this.rolesOf(chunk, positions);
    return { roles: count === chunk.rows ? roles : selectRows(roles, indices), kept: indices, sidelined, leftOut };
  }

  /** What the cells gave rise to, once all chunks are through. */
  questions(): SettingsQuestion[] {
    const questions = [...this.keeper.questions(), ...this.tally.questions()];
    if (this.decimals.negative > 0) {
      const text = `${this.decimals.negative.toLocaleString('en')} right ascensions below 0 were brought into 0 to 360 degrees.`;
      questions.push({ level: 'warning', pointer: '/columns/ra', text });
    }
    return questions;
  }

  private rolesOf(chunk: RowChunk, { raDeg, decDeg }: ChunkPositions): PackedColumns {
    const { recipe } = this;
    const columns: Record<string, Column> = { row: rowNumbers(chunk), raDeg, decDeg };
    if (recipe.name !== null) columns['name'] = nameCells(chunk, recipe.name);
    const cz = this.velocities(chunk, raDeg, decDeg);
    if (cz) columns['czKms'] = cz;
    for (const { target, recipe: number } of recipe.numbers) columns[target] = this.numbers(chunk, number, target, cz);
    if (recipe.redshiftError && !columns['velocityErrorKms']) {
      columns['velocityErrorKms'] = this.cells(chunk, recipe.redshiftError).map((error) => error * SPEED_OF_LIGHT_KMS);
    }
    this.distanceErrors(chunk, columns);
    this.magnitudes(chunk, columns);
    return { rows: chunk.rows, columns };
  }

  private cells(chunk: RowChunk, recipe: NumberRecipe, limits?: Uint8Array): Float64Array {
    return numberCells(chunk, recipe, this.recipe.marks, this.tally, limits);
  }

  private numbers(chunk: RowChunk, recipe: NumberRecipe, target: string, cz: Float64Array | undefined): Float64Array {
    const cells = this.cells(chunk, recipe);
    const { rule } = recipe.conversion;
    if (target === 'positionErrorArcsec') return cells.map((error) => sigmaOfError(error, this.resolved.errorMeaning));
    const isRadioWidth = target.startsWith('width') && this.resolved.velocity.convention === 'radio';
    if (rule === undefined && !isRadioWidth) return cells;
    const values = cells.slice();
    if (rule === 'lineWidthFromFrequency') toOpticalWidths(values, 'frequency', cz);
    else if (rule === 'fluxFromFrequency') toVelocityFlux(values, cz);
    else if (isRadioWidth) toOpticalWidths(values, 'radio', cz);
    return values;
  }

  private velocities(chunk: RowChunk, raDeg: Float64Array, decDeg: Float64Array): Float64Array | undefined {
    const { frame, convention } = this.resolved.velocity;
    const sources = [
      [this.recipe.velocity, convention],
      [this.recipe.redshift, 'redshift'],
      [this.recipe.frequency, 'frequency'],
    ] as const;
    let cz: Float64Array | undefined;
    for (const [recipe, what] of sources) {
      if (!recipe) continue;
      const values = toBarycentricCz(this.cells(chunk, recipe).slice(), what, frame, raDeg, decDeg);
      const first = cz;
      cz = first ? first.map((value, i) => (Number.isNaN(value) ? values[i]! : value)) : values;
    }
    return cz;
  }

  private distanceErrors(chunk: RowChunk, columns: Record<string, Column>): void {
    const wanted = this.recipe.distanceError;
    if (!wanted) return;
    const errors = this.cells(chunk, wanted.recipe);
    const distances = columns['distanceMpc'] as Float64Array;
    columns['distanceErrorMpc'] = wanted.ofModulus
      ? errors.map((mag, i) => (distances[i]! * Math.LN10 * mag) / 5)
      : errors;
  }

  private magnitudes(chunk: RowChunk, columns: Record<string, Column>): void {
    for (const { band, value, error, limitFlag } of this.recipe.magnitudes) {
      const limits = new Uint8Array(chunk.rows);
      columns[`mag:${band}`] = this.cells(chunk, value, limits);
      if (error) columns[`magError:${band}`] = this.cells(chunk, error);
      if (limitFlag !== null) readLimitFlags(chunk, limitFlag, limits);
      columns[`magLimit:${band}`] = limits;
    }
  }
}

function rowNumbers(chunk: RowChunk): Uint32Array {
  return (
    chunk.rowNumbers?.slice(0, chunk.rows) ?? Uint32Array.from({ length: chunk.rows }, (_, i) => chunk.firstRow + i)
  );
}

/** ">", "<", "1", "true", "y" and the like mark a limit; blank, 0 and words of "no" do not. */
function readLimitFlags(chunk: RowChunk, index: number, limits: Uint8Array): void {
  const flags: TextColumn | null = chunk.columns[index]!.kind === 'text' ? (chunk.columns[index] as TextColumn) : null;
  const data = chunk.columns[index]!;
  for (let i = 0; i < chunk.rows; i++) {
    if (!flags && data.kind === 'number') {
      if (!Number.isNaN(data.values[i]!)) {
        if (data.values[i] !== 0) limits[i] = 1;
        continue;
      }
      if (/^[<>]/.test(data.odd?.get(i)?.trim() ?? '')) limits[i] = 1;
    } else if (flags) {
      const text = Buffer.from(flags.bytes.subarray(flags.offsets[i], flags.offsets[i + 1]))
        .toString()
        .trim();
      if (text !== '' && !/^(0|f|false|n|no|=|-)$/i.test(text)) limits[i] = 1;
    }
  }
}
