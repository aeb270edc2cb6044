import type { StoredDecisions } from './run-inputs.ts';

/** A change of people's words between two runs, by the row of the HI list; null where it concerns the whole survey. */
export interface DecisionChange {
  readonly catalogueId: string | null;
  readonly row: number | null;
  readonly change: string;
}

const mpc = (distance: { distanceMpc: number; source: string } | undefined): string =>
  distance ? `${distance.distanceMpc.toFixed(1)} Mpc (${distance.source})` : 'the table’s';

/** Which replaced distances, accepted and rejected counterparts and cosmology one run took up and the other did not. */
export function decisionChanges(from: StoredDecisions, to: StoredDecisions): DecisionChange[] {
  const found: DecisionChange[] = [];
  for (const key of ['h0', 'omegaM'] as const) {
    const [a, b] = [from.cosmology[key], to.cosmology[key]];
    if (a !== b) found.push({ catalogueId: null, row: null, change: `cosmology ${key} ${a} -> ${b}` });
  }
  const place = (entry: { detectionCatalogueId: string; detectionRow: number }) =>
    `${entry.detectionCatalogueId}/${entry.detectionRow}`;
  const distances = (of: StoredDecisions) => new Map(of.distances.map((entry) => [place(entry), entry]));
  const [had, has] = [distances(from), distances(to)];
  for (const key of new Set([...had.keys(), ...has.keys()])) {
    const [a, b] = [had.get(key), has.get(key)];
    if (a?.distanceMpc === b?.distanceMpc && a?.errorMpc === b?.errorMpc) continue;
    const { detectionCatalogueId: catalogueId, detectionRow: row } = (b ?? a)!;
    found.push({ catalogueId, row, change: `distance replaced: ${mpc(a)} -> ${mpc(b)}` });
  }
  const pair = (entry: StoredDecisions['overrides'][number]) => `${place(entry)}/${entry.catalogueId}/${entry.row}`;
  const words = (of: StoredDecisions) => new Map(of.overrides.map((entry) => [pair(entry), entry]));
  const [before, after] = [words(from), words(to)];
  for (const key of new Set([...before.keys(), ...after.keys()])) {
    const [a, b] = [before.get(key), after.get(key)];
    if (a?.action === b?.action) continue;
    const { detectionCatalogueId: catalogueId, detectionRow: row, row: objectRow } = (b ?? a)!;
    const change = b ? `counterpart ${b.action}ed: row ${objectRow}` : `word on row ${objectRow} taken back`;
    found.push({ catalogueId, row, change });
  }
  return found;
}
