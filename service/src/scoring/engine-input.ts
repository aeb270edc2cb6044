import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { CatalogueKind } from '@eremite/shared/contracts/words';
import type { CatalogueDigest } from './catalogue-digest.ts';
import type { RoleTable } from '../tiles/role-table.ts';

/** What is known of one band of a catalogue. */
export interface EngineBand {
  /** Canonical identifier of the band where it is known, else the word of the table. */
  name: string;
  system: 'AB' | 'Vega';
  /** 5-sigma point-source depth in `system`; null where not stated, and then it is not invented. */
  depth5Sigma: number | null;
  seeingFwhmArcsec: number | null;
  extinction: 'none' | 'column' | 'already-corrected';
}

/** A region as ranges [start, end) of nested HEALPix cells of one order, flat in pairs. */
export interface EngineCoverage {
  order: number;
  ranges: Float64Array;
}

/** One table of a run, in memory: plain data, so that it can be handed to a worker thread. */
export interface EngineCatalogue {
  id: string;
  name: string;
  kind: CatalogueKind;
  /** Hash of its content and settings. */
  hash: string;
  bands: EngineBand[];
  beamArcsec: { major: number; minor: number; angleDeg: number } | null;
  /** 1-D sigma of all rows without one of their own, arcsec; null where not stated. */
  positionErrorArcsec: number | null;
  distanceKind: 'angular' | 'luminosity';
  redshiftDepth: { band: string; magnitude: number } | null;
  /** Null: what it covers is unknown. */
  coverage: EngineCoverage | null;
  coverageNote: string;
  /** Rows in file order: all, or with a digest only those that can matter to the run. */
  roles: RoleTable;
  /** What there is to know of all rows, where `roles` holds only some. */
  digest?: CatalogueDigest;
}

export interface EngineOverride {
  detectionCatalogueId: string;
  detectionRow: number;
  catalogueId: string;
  rowId: number;
  action: 'accept' | 'reject';
  /** Who and why, for the grounds. */
  by: string;
  note: string;
}

export interface EngineDistance {
  catalogueId: string;
  row: number;
  distanceMpc: number;
  errorMpc: number | null;
  source: string;
}

/** Everything a run depends on. */
export interface EngineInput {
  survey: { h0: number; omegaM: number };
  criteria: CriteriaSettings;
  catalogues: EngineCatalogue[];
  decisions: { overrides: EngineOverride[]; distances: EngineDistance[] };
}
