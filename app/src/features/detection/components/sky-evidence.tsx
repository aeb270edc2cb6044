import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { finderChartSvg } from '@eremite/shared/drawing/finder-chart';
import { stripZones } from '@eremite/shared/drawing/strip-zones';
import { surroundingsStripSvg } from '@eremite/shared/drawing/surroundings-strip';
import { useCallback, useMemo, type ComponentProps } from 'react';
import { SaveMenu } from '#components/save-menu/save-menu.tsx';
import { SkyPanel } from '#components/sky-map/sky-panel.tsx';
import { SurroundingsStrip } from '#components/surroundings-strip/surroundings-strip.tsx';
import { fileNameOf } from '#lib/save-picture.ts';
import { useFieldMarks } from '../hooks/use-field-marks.ts';
import { useOutlines, useSearched, useVerdictMarks } from '../hooks/use-panel-data.ts';

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

/** What is seen of one detection: its sky, and its surroundings in separation and velocity. */
export function SkyEvidence({ detail, settings, catalogues, ...link }: SkyEvidenceProps) {
  const { name } = detail.verdict;
  const { centre, marks, windowKms } = useVerdictMarks(detail, settings);
  const { tables, coverages } = useSearched(catalogues);
  const sky = useFieldMarks(detail, marks, windowKms);
  const outlines = useOutlines(detail, coverages, sky.field);
  const zones = useMemo(() => settings && stripZones(detail, settings), [detail, settings]);
  const { selected } = link;
  const drawFinder = useCallback<DrawFinder>(
    (view) =>
      finderChartSvg(
        { detail, settings: settings!, coverages, marks: view.marks },
        { radiusArcsec: view.radiusArcsec, centre: view.centre, named: selected ? [selected] : [] },
      ),
    [detail, settings, coverages, selected],
  );
  return (
    <>
      <SkyPanel
        name={name}
        centre={centre}
        distanceMpc={detail.distance.angularMpc}
        outlines={outlines}
        marks={sky.marks}
        tables={tables}
        note={sky.note}
        onReach={sky.onReach}
        {...(settings ? { drawFinder } : {})}
        {...link}
      />
      {zones && settings && (
        <SurroundingsStrip
          marks={marks}
          zones={zones}
          tools={
            <SaveMenu
              label="Save the surroundings strip"
              fileName={fileNameOf(`${name}-surroundings`)}
              draw={() => surroundingsStripSvg({ detail, settings }, { width: 720, height: 270 })}
            />
          }
          {...link}
        />
      )}
    </>
  );
}
