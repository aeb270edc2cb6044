import { Button } from '@blueprintjs/core';
import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { finderChartSvg } from '@eremite/shared/drawing/finder-chart';
import { toSkyMarks } from '@eremite/shared/drawing/sky-mark';
import { stripZones } from '@eremite/shared/drawing/strip-zones';
import { surroundingsStripSvg } from '@eremite/shared/drawing/surroundings-strip';
import { useCallback, useMemo, useState, type ComponentProps } from 'react';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { SaveMenu } from '#components/save-menu/save-menu.tsx';
import { SkyPanel } from '#components/sky-map/sky-panel.tsx';
import { SurroundingsStrip } from '#components/surroundings-strip/surroundings-strip.tsx';
import { fileNameOf } from '#lib/save-picture.ts';
import { useBackdrop } from '../hooks/use-backdrop.ts';
import { useFieldMarks } from '../hooks/use-field-marks.ts';
import { useOutlines, useSearched, useVerdictMarks } from '../hooks/use-panel-data.ts';
import { useWhatIf } from '../hooks/use-what-if.ts';
import { ImageBar } from './image-bar.tsx';
import { WhatIfPanel } from './what-if.tsx';

interface SkyEvidenceProps {
  detail: VerdictDetail;
  settings: CriteriaSettings | undefined;
  catalogues: readonly Catalogue[] | undefined;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

type DrawFinder = NonNullable<ComponentProps<typeof SkyPanel>['drawFinder']>;
const DEGREE_ARCSEC = 3600;

/** What is seen of one detection: its sky, and its surroundings in separation and velocity; at other distances too. */
export function SkyEvidence({ detail, settings, catalogues, ...link }: SkyEvidenceProps) {
  const { name } = detail.verdict;
  const { centre, marks, windowKms } = useVerdictMarks(detail, settings);
  const { tables, coverages } = useSearched(catalogues);
  const whatIf = useWhatIf(detail);
  const { supposedMpc, answer, point } = whatIf;
  const sky = useFieldMarks(detail, marks, windowKms);
  const [viewReach, setViewReach] = useState(1);
  const imagery = useBackdrop(detail.verdict.detectionId, centre, viewReach);
  const { onReach } = sky;
  const lookAsFarAs = useCallback(
    (reach: number) => {
      onReach(reach);
      setViewReach(reach);
    },
    [onReach],
  );
  const nominal = useOutlines(detail, coverages, sky.field);
  const distanceMpc = supposedMpc ?? detail.distance.angularMpc;
  const outlines = useMemo(() => {
    if (supposedMpc === undefined || !point || !settings) return nominal;
    const radius = settings.surroundings.radiusMpc / supposedMpc;
    return {
      ...nominal,
      searchRadiusArcsec: point.searchRadiusArcsec,
      neighbourRadiusArcsec: (radius * 180 * DEGREE_ARCSEC) / Math.PI,
    };
  }, [nominal, supposedMpc, point, settings]);
  const skyMarks = useMemo(() => atDistance(sky.marks, distanceMpc), [sky.marks, distanceMpc]);
  const stripMarks = useMemo(
    () => (answer ? toSkyMarks(detail.candidates, answer.neighbours, windowKms) : marks),
    [answer, detail, marks, windowKms],
  );
  const zones = useMemo(() => {
    if (!settings) return undefined;
    const shown = point ? { ...detail, searchRadiusArcsec: point.searchRadiusArcsec } : detail;
    return stripZones(shown, settings, distanceMpc ?? point?.angularMpc);
  }, [detail, settings, point, distanceMpc]);
  const { selected } = link;
  const drawFinder = useCallback<DrawFinder>(
    (view) =>
      finderChartSvg(
        { detail, settings: settings!, coverages, marks: view.marks },
        { radiusArcsec: view.radiusArcsec, centre: view.centre, named: selected ? [selected] : [] },
      ),
    [detail, settings, coverages, selected],
  );
  const drawStrip = () =>
    surroundingsStripSvg(
      { detail, settings: settings!, marks: stripMarks },
      { width: 720, height: 270, ...(zones ? { atMpc: zones.atMpc } : {}) },
    );
  const ask = (
    <Button
      size="small"
      text="what if the distance were…"
      active={whatIf.isOn}
      aria-pressed={whatIf.isOn}
      onClick={whatIf.toggle}
    />
  );
  const below = whatIf.isOn && (
    <>
      <ProblemCallout error={whatIf.error} />
      {whatIf.isFetching && !answer && <Loading what="Judging at other distances" />}
      {answer && point && (
        <WhatIfPanel
          answer={answer}
          nominalMpc={detail.distance.angularMpc}
          atMpc={distanceMpc ?? point.angularMpc}
          point={point}
          onSuppose={whatIf.suppose}
        />
      )}
    </>
  );
  return (
    <>
      <SkyPanel
        name={name}
        centre={centre}
        distanceMpc={distanceMpc}
        outlines={outlines}
        marks={skyMarks}
        tables={tables}
        note={sky.note}
        onReach={lookAsFarAs}
        backdrop={imagery.backdrop}
        {...(settings ? { drawFinder } : {})}
        {...link}
      />
      <ProblemCallout error={imagery.error} />
      <ImageBar {...imagery} centre={centre} />
      {zones ? (
        <SurroundingsStrip
          marks={stripMarks}
          zones={zones}
          tools={
            <>
              {ask}
              <SaveMenu
                label="Save the surroundings strip"
                fileName={fileNameOf(`${name}-surroundings`)}
                draw={drawStrip}
              />
            </>
          }
          {...link}
        >
          {below}
        </SurroundingsStrip>
      ) : (
        <div className="strip">
          <div className="strip__tools">
            <span className="muted small grow">Without a usable distance no projected separation can be told.</span>
            {ask}
          </div>
          {below}
        </div>
      )}
    </>
  );
}

/** Marks with their projected separation at a distance (angular-diameter, Mpc). */
const atDistance = <M extends { separationArcsec: number }>(marks: readonly M[], mpc: number | null) => {
  const kpcPerArcsec = mpc === null ? null : (mpc * 1000 * Math.PI) / (180 * DEGREE_ARCSEC);
  return marks.map((mark) => ({
    ...mark,
    separationKpc: kpcPerArcsec === null ? null : mark.separationArcsec * kpcPerArcsec,
  }));
};
