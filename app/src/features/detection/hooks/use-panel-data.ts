import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { Field } from '@eremite/shared/contracts/field';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { toPanel } from '@eremite/shared/drawing/panel-plane';
import { toSkyMarks } from '@eremite/shared/drawing/sky-mark';
import { uncoveredAreas, type Coverage } from '@eremite/shared/drawing/uncovered-cells';
import { useMemo } from 'react';
import type { Outlines } from '#components/sky-map/outline-layers.ts';

const WINDOW_KMS = 500;

/** Middle, marks and velocity window of the sky panel and the strip of one verdict. */
export function useVerdictMarks(detail: VerdictDetail, settings: CriteriaSettings | undefined) {
  const windowKms = settings?.surroundings.velocityWindowKms ?? WINDOW_KMS;
  const { raDeg, decDeg } = detail.verdict;
  const centre = useMemo(() => ({ raDeg, decDeg }), [raDeg, decDeg]);
  const marks = useMemo(() => toSkyMarks(detail.candidates, detail.neighbours, windowKms), [detail, windowKms]);
  return { centre, marks, windowKms };
}

/** Tables that were searched, with their footprints. */
export function useSearched(catalogues: readonly Catalogue[] | undefined) {
  return useMemo(() => {
    const shown = catalogues?.filter(({ kind, state }) => kind !== 'groups' && state === 'published') ?? [];
    const coverages: Coverage[] = shown
      .filter(({ kind }) => kind !== 'hi')
      .map(({ id, name, kind, coverage }) => ({ id, name, kind, moc: coverage.moc }));
    return { tables: shown.map(({ id, name, kind }) => ({ catalogueId: id, name, kind })), coverages };
  }, [catalogues]);
}

/** Everything on the panel that is not an object. */
export function useOutlines(detail: VerdictDetail, coverages: readonly Coverage[], field: Field | undefined): Outlines {
  const { raDeg, decDeg } = detail.verdict;
  const centre = useMemo(() => ({ raDeg, decDeg }), [raDeg, decDeg]);
  const uncovered = useMemo(() => {
    const { searchRadiusArcsec, neighbourRadiusArcsec } = detail;
    return uncoveredAreas(coverages, centre, Math.max(searchRadiusArcsec * 8, neighbourRadiusArcsec ?? 0));
  }, [detail, coverages, centre]);
  return useMemo(() => {
    const { beamArcsec, positionError, searchRadiusArcsec, neighbourRadiusArcsec, masks } = detail;
    const otherBeams = (field?.tables ?? []).flatMap(({ beamArcsec: beam, raDeg: ra, decDeg: dec }) =>
      ra.flatMap((_, i) => {
        const at = beam && toPanel(ra[i]!, dec[i]!, centre);
        return at ? [{ at, ...beam }] : [];
      }),
    );
    return {
      beam: beamArcsec,
      positionError,
      searchRadiusArcsec,
      neighbourRadiusArcsec,
      masks: masks.flatMap((mask) => {
        const at = toPanel(mask.raDeg, mask.decDeg, centre);
        return at ? [{ at, radiusArcsec: mask.radiusArcsec, label: mask.label }] : [];
      }),
      uncovered,
      otherBeams,
    };
  }, [detail, field, uncovered, centre]);
}
