import type { CatalogueKind } from '@eremite/shared/contracts/words';
import { type ErrorMeaning, sigmaOfError } from '@eremite/shared/science/counterpart/position-error';
import type { RoleTable } from '../tiles/role-table.ts';
import type { EngineBand, EngineCatalogue, EngineCoverage } from './engine-input.ts';

/** The settled settings of a table, as far as scoring needs them. */
export interface CatalogueSettings {
  kind: CatalogueKind;
  name: string;
  bands: EngineBand[];
  beamArcsec: { major: number; minor: number; angleDeg: number } | null;
  positionErrorArcsec: number | null;
  errorMeaning: ErrorMeaning;
  distanceKind: 'angular' | 'luminosity';
  redshiftDepth: { band: string; magnitude: number } | null;
}

/** Makes a table ready to be handed to the engine, in this thread or another. */
export function engineCatalogue(
  identity: { id: string; hash: string },
  settings: CatalogueSettings,
  roles: RoleTable,
  coverage: { region: EngineCoverage | null; note: string },
): EngineCatalogue {
  const { kind, name, bands, beamArcsec, distanceKind, redshiftDepth, positionErrorArcsec, errorMeaning } = settings;
  return {
    ...identity,
    kind,
    name,
    bands,
    beamArcsec,
    distanceKind,
    redshiftDepth,
    positionErrorArcsec: positionErrorArcsec === null ? null : sigmaOfError(positionErrorArcsec, errorMeaning),
    coverage: coverage.region,
    coverageNote: coverage.note,
    roles,
  };
}
