import type { PreparedCatalogue } from './prepared-catalogue.ts';
import type { SurroundingsContext } from './surroundings.ts';

/** Sentences about what the searched tables leave open: region, depth and reach in redshift. */
export function tableNotes(searched: readonly PreparedCatalogue[], reaches: SurroundingsContext['reaches']): string[] {
  const notes: string[] = [];
  for (const { input, areaFromRows } of searched) {
    if (areaFromRows)
      notes.push(`${input.name}: ${input.coverageNote} Densities are taken over the cells its rows occupy.`);
    const shallow = input.bands.filter(({ depth5Sigma }) => depth5Sigma === null).map(({ name }) => name);
    if (shallow.length > 0)
      notes.push(`${input.name}: no depth is stated for ${shallow.join(', ')}; its silence there counts for nothing.`);
  }
  for (const { measured, catalogue, band, magnitude } of reaches) {
    if (measured)
      notes.push(`${catalogue.input.name}: redshifts reach ${band} ${magnitude.toFixed(1)}, measured from its rows.`);
  }
  return notes;
}
