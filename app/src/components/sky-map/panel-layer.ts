import type { SkyMark } from '@eremite/shared/drawing/sky-mark';

/** A table whose objects the panel can show. */
export interface PanelLayer {
  catalogueId: string;
  name: string;
  kind: string;
  /** How many of its objects are loaded. */
  objects: number;
}

/** The tables in their order, with how many of their objects there are. */
export function panelLayers(
  tables: readonly Omit<PanelLayer, 'objects'>[],
  marks: readonly Pick<SkyMark, 'catalogueId'>[],
): PanelLayer[] {
  const counts = new Map<string, number>();
  for (const { catalogueId } of marks) counts.set(catalogueId, (counts.get(catalogueId) ?? 0) + 1);
  return tables.map(({ catalogueId, name, kind }) => ({
    catalogueId,
    name,
    kind,
    objects: counts.get(catalogueId) ?? 0,
  }));
}
