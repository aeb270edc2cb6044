import type { SettingsQuestion } from '@eremite/shared/contracts/intake';
import type { RowChunk } from '../tables/table.ts';
import type { Recipe } from './recipe.ts';
import { cellAt } from './sample.ts';

/** Values of a column shown to someone whose filter found none. */
const EXAMPLES = 6;
const LONGEST = 40;

/** The `keep` settings at work over all chunks; remembers which of their values were met. */
export class RowKeeper {
  private readonly met: Set<string>[];
  private readonly others: Set<string>[];

  constructor(private readonly rules: Recipe['keep']) {
    this.met = rules.map(() => new Set());
    this.others = rules.map(() => new Set());
  }

  /** 1 for every row that is wanted, 0 for the others; undefined where all are wanted. */
  keep(chunk: RowChunk): Uint8Array | undefined {
    if (this.rules.length === 0) return undefined;
    const wanted = new Uint8Array(chunk.rows).fill(1);
    for (const [rule, { index, values }] of this.rules.entries()) {
      const data = chunk.columns[index]!;
      const [met, others] = [this.met[rule]!, this.others[rule]!];
      for (let i = 0; i < chunk.rows; i++) {
        const number = data.kind === 'number' ? data.values[i]! : NaN;
        const value = values.get(number) ?? values.get(cellAt(data, i).trim());
        if (value !== undefined) met.add(value);
        else {
          wanted[i] = 0;
          if (others.size < EXAMPLES) others.add(cellAt(data, i).trim().slice(0, LONGEST));
        }
      }
    }
    return wanted;
  }

  /** Filters that no row passes, and values that no row has: most often a slip of the pen. */
  questions(): SettingsQuestion[] {
    return this.rules.flatMap(({ column, values }, rule): SettingsQuestion[] => {
      const unmet = [...new Set(values.values())].filter((value) => !this.met[rule]!.has(value));
      if (unmet.length === 0) return [];
      const others = [...this.others[rule]!].map((value) => `"${value}"`).join(', ');
      const none = this.met[rule]!.size === 0;
      const text =
        `No row has ${unmet.map((value) => `"${value}"`).join(' or ')} in "${column}"` +
        (none ? ', so none would be kept.' : '.') +
        (others ? ` Other values there are ${others}.` : '');
      return [{ level: none ? 'ask' : 'warning', pointer: `/keep/${rule}/values`, text }];
    });
  }
}
