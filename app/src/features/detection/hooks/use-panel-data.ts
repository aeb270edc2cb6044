import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { useMemo } from 'react';
import type { Outlines } from '#components/sky-map/outline-layers.ts';
import { toPanel } from '@eremite/shared/drawing/panel-plane';
import { toSkyMarks } from '@eremite/shared/drawing/sky-mark';
import { uncoveredAreas } from '@eremite/shared/drawing/uncovered-cells';
import type { Zones } from '#components/surroundings-strip/strip-zones.tsx';

/** What the sky panel and the strip draw of one verdict. */
export function usePanelData(
  detail: VerdictDetail,
  settings: CriteriaSettings | undefined,
  catalogues: readonly Catalogue[] | undefined,
) {
  const windowKms = settings?.surroundings.velocityWindowKms ?? 500;
  const { raDeg, decDeg } = detail.verdict;
  const centre = useMemo(() => ({ raDeg, decDeg }), [raDeg, decDeg]);
  const marks = useMemo(() => toSkyMarks(detail.candidates, detail.neighbours, windowKms), [detail, windowKms]);
  const outlines = useMemo((): Outlines => {
    const { beamArcsec, positionError, searchRadiusArcsec, neighbourRadiusArcsec, masks } = detail;
    const searched = catalogues?.filter(
      ({ kind, state }) => kind !== 'hi' && kind !== 'groups' && state === 'published',
    );
    const coverages = searched?.map(({ name, kind, coverage }) => ({ name, kind, moc: coverage.moc })) ?? [];
    return {
      beam: beamArcsec,
      positionError,
      searchRadiusArcsec,
      neighbourRadiusArcsec,
      masks: masks.flatMap((mask) => {
        const at = toPanel(mask.raDeg, mask.decDeg, centre);
        return at ? [{ at, radiusArcsec: mask.radiusArcsec, label: mask.label }] : [];
      }),
      uncovered: uncoveredAreas(coverages, centre, Math.max(searchRadiusArcsec * 8, neighbourRadiusArcsec ?? 0)),
    };
  }, [detail, catalogues, centre]);
  const zones = useMemo((): Zones => {
    const kpcPerArcsec =
      detail.distance.angularMpc === null ? null : (detail.distance.angularMpc * 1000 * Math.PI) / 648_000;
    return {
      counterpartKpc: kpcPerArcsec === null ? null : detail.searchRadiusArcsec * kpcPerArcsec,
      debrisKpc: settings?.doubts.strongDebrisKpc ?? 250,
      debrisKms: settings?.doubts.strongDebrisKms ?? 300,
      neighbourKpc: (settings?.surroundings.radiusMpc ?? 1) * 1000,
      neighbourKms: windowKms,
    };
  }, [detail, settings, windowKms]);
  return { centre, marks, outlines, zones };
}
