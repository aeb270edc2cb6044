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
    const list = this.lists.findLast(({ first }) => first <= position)!;
    const catalogue = this.input.catalogues[list.catalogue]!;
    return readDetection(this.input, catalogue, list.catalogue, position - list.first, position, this.replaced);
  }
}
