import { buildConeIndex } from '../../matching/cone-index.ts';
import { coneSearch } from '../../matching/cone-search.ts';
import { bindSource, type Bound, type NumberedSource } from './bind-source.ts';

/** How far an HI centroid may move between two versions of a list, arcsec: some beams are arcminutes wide. */
const HI_TOLERANCE_ARCSEC = 60;
/** How much further rows are offered to choose from. */
const OFFERED = 5;

type Detection = NumberedSource & { readonly id: string };

/** Finds detections of one version of an HI list in the next. */
export function boundDetections<D extends Detection>(
  wanted: readonly D[],
  before: readonly Detection[],
  after: readonly Detection[],
): (Bound & { source: D })[] {
  const index = buildConeIndex(
    Float64Array.from(after, ({ raDeg }) => raDeg),
    Float64Array.from(after, ({ decDeg }) => decDeg),
  );
  const byName = new Map(after.map((row) => [row.name, row]));
  const owner = new Map(before.map((row) => [row.name, row.id]));
  return wanted.map((source) => {
    const near = [...coneSearch(index, source.raDeg, source.decDeg, HI_TOLERANCE_ARCSEC * OFFERED).row].map(
      (i) => after[i]!,
    );
    const named = byName.get(source.name);
    const rows = named && !near.includes(named) ? [...near, named] : near;
    const isOthers = (name: string) => (owner.get(name) ?? source.id) !== source.id;
    return { source, ...bindSource(source, rows, HI_TOLERANCE_ARCSEC, isOthers) };
  });
}
