import type { ColumnRole, IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { CatalogueKind } from '@eremite/shared/contracts/words';

export interface ResolvedBand {
  /** Canonical identifier where the band is known, else as the person wrote it. */
  name: string;
  system: 'AB' | 'Vega';
  /** 5-sigma point-source depth in `system`; null where not stated. */
  depth5Sigma: number | null;
  seeingFwhmArcsec: number | null;
  extinction: 'none' | 'column' | 'already-corrected';
}

export interface ResolvedMagnitude {
  column: string;
  error: string | null;
  limitFlag: string | null;
  band: string;
}

/**
 * Settings with nothing left open. They are settings themselves: read again with the same table they resolve to the
 * same, which is how a published catalogue can be read anew.
 */
export interface ResolvedSettings extends IntakeSettings {
  table: number;
  kind: CatalogueKind;
  name: string;
  /** Every role that has a column; roles without one are null so that nothing is guessed again. */
  columns: Record<ColumnRole, string | null> & { magnitudes: ResolvedMagnitude[] };
  /** Unit by role, and by `magnitude:<band>`. */
  units: Record<string, string>;
  frame: 'icrs' | 'fk5' | 'fk4' | 'galactic';
  velocity: {
    convention: 'optical' | 'radio' | 'relativistic';
    frame: 'barycentric' | 'lsrk' | 'local-group' | 'cmb';
  };
  errorMeaning: NonNullable<IntakeSettings['errorMeaning']>;
  /** As given (its meaning is `errorMeaning`); null only where it follows from beam and S/N. */
  positionErrorArcsec: number | null;
  beamArcsec: { major: number; minor: number; angleDeg: number } | null;
  distanceKind: 'angular' | 'luminosity';
  bands: ResolvedBand[];
  redshiftDepth: { band: string; magnitude: number } | null;
  missing: string[];
  keep: NonNullable<IntakeSettings['keep']>;
  footprint: NonNullable<IntakeSettings['footprint']>;
  reference: string;
}

/** A setting that cannot be carried out with this table. */
export interface SettingsFault {
  /** JSON pointer into the settings. */
  pointer: string;
  detail: string;
}

/** Settings that do not fit their table; the message holds every fault, one a line. */
export class SettingsError extends Error {
  override readonly name = 'SettingsError';
  constructor(readonly faults: readonly SettingsFault[]) {
    super(faults.map(({ pointer, detail }) => `${pointer || '/'}: ${detail}`).join('\n'));
  }
}
