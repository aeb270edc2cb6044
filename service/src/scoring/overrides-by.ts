import type { OverrideOf } from './candidate-row.ts';
import type { EngineInput } from './engine-input.ts';

/** What the team has said of an object as the counterpart of a detection; null where it has said nothing at all. */
export function overridesBy({ decisions, catalogues }: EngineInput): OverrideOf | null {
  if (decisions.overrides.length === 0) return null;
  const byPair = new Map(
    decisions.overrides.map((o) => [
      `${o.detectionCatalogueId}/${o.detectionRow}/${o.catalogueId}/${o.rowId}`,
      o.action,
    ]),
  );
  return (detection, catalogue, row) =>
    byPair.get(`${catalogues[detection.catalogue]!.id}/${detection.row}/${catalogue.input.id}/${row}`) ?? null;
}
