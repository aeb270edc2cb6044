import { type Detection, type ReplacedDistances, readDetection, replacedDistances } from './detection-table.ts';
import type { EngineInput } from './engine-input.ts';
import { LocalReddening } from './local-reddening.ts';

/**
 * The detections of a run in input order: HI tables as listed, rows as in the file. Each is read when it is asked for, so
 * that a thread makes only those it scores.
 */
export class Detections {
  readonly length: number;
  /** First position of each HI table, with its index in the input. */
  private readonly lists: { catalogue: number; first: number }[] = [];
  private readonly replaced: ReplacedDistances;
  private readonly reddening: LocalReddening;

  constructor(private readonly input: EngineInput) {
    let length = 0;
    input.catalogues.forEach(({ kind, roles }, catalogue) => {
      if (kind !== 'hi') return;
      this.lists.push({ catalogue, first: length });
      length += roles.rows;
    });
    this.length = length;
    this.replaced = replacedDistances(input);
    this.reddening = new LocalReddening(input.catalogues);
  }

  /** Detections [from, to). */
  range(from: number, to: number): Detection[] {
    return this.pick(Array.from({ length: Math.max(0, to - from) }, (_, i) => from + i));
  }

  /** Detections at some positions. */
  pick(positions: readonly number[]): Detection[] {
    const picked = positions.map((position) => this.read(position));
    this.reddening.fill(picked);
    return picked;
  }

  at(position: number): Detection {
    return this.pick([position])[0]!;
  }

  /** One detection at each of some distances, as though they had been measured. */
  moved(position: number, distances: readonly { distanceMpc: number; errorMpc: number | null }[]): Detection[] {
    const { catalogue, index, row } = this.place(position);
    const { id: catalogueId } = this.input.catalogues[catalogue]!;
    const moved = distances.map((distance) => {
      const replaced = new Map([[`${catalogueId}/${row}`, { catalogueId, row, source: 'supposed', ...distance }]]);
      return readDetection(this.input, this.input.catalogues[catalogue]!, catalogue, index, position, replaced);
    });
    this.reddening.fill(moved);
    return moved;
  }

  /** Places of all detections, degrees. */
  places(): { raDeg: Float64Array; decDeg: Float64Array } {
    const raDeg = new Float64Array(this.length);
    const decDeg = new Float64Array(this.length);
    for (const { catalogue, first } of this.lists) {
      const { columns } = this.input.catalogues[catalogue]!.roles;
      raDeg.set(columns.raDeg, first);
      decDeg.set(columns.decDeg, first);
    }
    return { raDeg, decDeg };
  }

  /** Position of a row of an HI table; -1 where there is none. */
  positionOf(catalogueId: string, row: number): number {
    for (const { catalogue, first } of this.lists) {
      const { id, roles } = this.input.catalogues[catalogue]!;
      const index = id === catalogueId ? roles.columns.row.indexOf(row) : -1;
      if (index >= 0) return first + index;
    }
    return -1;
  }

  private read(position: number): Detection {
    const { catalogue, index } = this.place(position);
    const table = this.input.catalogues[catalogue]!;
    return readDetection(this.input, table, catalogue, index, position, this.replaced);
  }

  private place(position: number): { catalogue: number; index: number; row: number } {
    const { catalogue, first } = this.lists.findLast((list) => list.first <= position)!;
    const index = position - first;
    return { catalogue, index, row: this.input.catalogues[catalogue]!.roles.columns.row[index]! };
  }
}
