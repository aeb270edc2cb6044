import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { CatalogueRow } from './catalogues.repository.ts';

/** The contract's form of a published catalogue. */
export function toCatalogue({
  catalogue: row,
  usedByRuns,
}: {
  catalogue: CatalogueRow;
  usedByRuns: number;
}): Catalogue {
  const { id, surveyId, name, fileName, sha256, rows, sidelined, withVelocity, reference } = row;
  const { type, areaSqDeg, moc, note } = row.coverage as Catalogue['coverage'];
  return {
    id,
    surveyId,
    name,
    kind: row.kind as Catalogue['kind'],
    state: row.state as Catalogue['state'],
    fileName,
    sha256,
    parts: row.parts as Catalogue['parts'],
    rows,
    sidelined,
    withVelocity,
    bands: row.bands as Catalogue['bands'],
    columns: row.columns as Catalogue['columns'],
    settings: row.settings as Catalogue['settings'],
    assumed: row.assumed as string[],
    coverage: { type, areaSqDeg, moc, note },
    reference,
    publishedAt: row.publishedAt?.toISOString() ?? null,
    usedByRuns,
  };
}
