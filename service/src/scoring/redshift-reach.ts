import { redshiftDepthOf } from '@eremite/shared/science/surroundings/redshift-depth';
import { DEGREE } from '@eremite/shared/science/constants';
import { DWARF_COLOURS } from '@eremite/shared/science/hydrogen/dwarf-colours';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import type { Detection } from './detection-table.ts';
import type { PreparedBand, PreparedCatalogue } from './prepared-catalogue.ts';

/** How deep the redshifts of a catalogue go. */
export interface RedshiftReach {
  catalogue: PreparedCatalogue;
  /** r magnitude, AB, to which redshifts are complete. */
  limitR: number;
  measured: boolean;
  band: string;
  magnitude: number;
}

/** m_r (AB) of a magnitude in a band, by the mean colour of late-type galaxies; NaN where the colour is not known. */
export function asR(magnitude: number, id: BandId | undefined, toAb: number): number {
  const colour = id && DWARF_COLOURS[id];
  return colour ? magnitude + toAb - colour.minusR : NaN;
}

/** Redshift depth of each catalogue of galaxies that has one: as stated, else measured from its rows. */
export function redshiftReaches(catalogues: readonly PreparedCatalogue[]): RedshiftReach[] {
  const reaches: RedshiftReach[] = [];
  for (const catalogue of catalogues) {
    const { kind, redshiftDepth } = catalogue.input;
    if (kind === 'hi' || kind === 'stars' || kind === 'groups' || !catalogue.czKms) continue;
    if (redshiftDepth) {
      const band = catalogue.bands.find(({ name }) => name === redshiftDepth.band);
      const id = redshiftDepth.band in BANDS ? (redshiftDepth.band as BandId) : undefined;
      const toAb = band ? band.toAb : id && BANDS[id].usualSystem === 'Vega' ? BANDS[id].abMinusVega : 0;
      const limitR = asR(redshiftDepth.magnitude, id, toAb);
      if (!Number.isNaN(limitR)) reaches.push({ catalogue, limitR, measured: false, ...redshiftDepth });
      continue;
    }
    const measured = measure(
      catalogue,
      catalogue.bands.find(({ id }) => id !== undefined),
    );
    if (measured) reaches.push(measured);
  }
  return reaches.sort((a, b) => b.limitR - a.limitR || a.catalogue.index - b.catalogue.index);
}

function measure(catalogue: PreparedCatalogue, band: PreparedBand | undefined): RedshiftReach | undefined {
  if (!band) return undefined;
  const counts = catalogue.digest.redshifts[band.name];
  const magnitude = counts && redshiftDepthOf(counts.all, counts.moving);
  if (magnitude === undefined) return undefined;
  const limitR = asR(magnitude, band.id, band.toAb);
  return Number.isNaN(limitR) ? undefined : { catalogue, limitR, measured: true, band: band.name, magnitude };
}

/** The deepest redshifts at a place; a table whose coverage is unknown serves where none is known to cover it. */
export function reachAt(reaches: readonly RedshiftReach[], { raDeg, decDeg }: Detection): RedshiftReach | undefined {
  const ra = (((raDeg % 360) + 360) % 360) * DEGREE;
  return (
    reaches.find(({ catalogue }) => catalogue.moc?.contains(ra, decDeg * DEGREE)) ??
    reaches.find(({ catalogue }) => !catalogue.moc)
  );
}
