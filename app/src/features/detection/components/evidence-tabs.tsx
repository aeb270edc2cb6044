import { Button, Tab, Tabs } from '@blueprintjs/core';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { useMemo, type ReactNode } from 'react';
import { DataTable } from '#components/data-table/data-table.tsx';
import { rowKey } from '@eremite/shared/drawing/sky-mark';
import { chosenCandidate, type Decisions } from '../hooks/use-decisions.ts';
import { DistanceBranches } from './distance-branches.tsx';
import { History, type Said } from './history.tsx';
import { ImagesTab } from './images-tab.tsx';
import { DepthTable, LimitTable } from './limit-table.tsx';
import { LineTab } from './line-tab.tsx';
import { MeasuresTable } from './measures-table.tsx';
import { candidateColumns, neighbourColumns } from './object-columns.tsx';
import { Robustness } from './robustness.tsx';

interface EvidenceTabsProps {
  detail: VerdictDetail;
  settings: CriteriaSettings | undefined;
  decisions: Decisions;
  said: Said;
  tab: string;
  onTab: (tab: string) => void;
  hovered: string | null;
  selected: string | null;
  onHover: (key: string | null) => void;
  onSelect: (key: string | null) => void;
}

/** The tables behind the verdict; their rows are the marks on the panel. */
export function EvidenceTabs(props: EvidenceTabsProps) {
  const { detail, decisions, said, hovered, selected, onHover, onSelect } = props;
  const { candidates, neighbours, limits } = detail;
  const forCandidates = useMemo(() => candidateColumns(onSelect), [onSelect]);
  const forNeighbours = useMemo(() => neighbourColumns(onSelect), [onSelect]);
  const linked = { hovered, selected, onHover, onSelect, rowKey };
  const chosen = chosenCandidate(detail, selected);
  const panels: [id: string, title: string, panel: ReactNode][] = [
    [
      'candidates',
      `Candidates ${candidates.length}`,
      candidates.length === 0 ? (
        <p className="muted">No row of any catalogue lies within the search radius.</p>
      ) : (
        <>
          {chosen && decisions.mayDecide && (
            <div className="row chosen-bar">
              <span className="mono">{chosen.name}</span>
              <Button
                size="small"
                text="Make it the counterpart"
                onClick={() => decisions.ask({ what: 'accept', candidate: chosen })}
              />
              <Button
                size="small"
                text="Reject it"
                onClick={() => decisions.ask({ what: 'reject', candidate: chosen })}
              />
            </div>
          )}
          <DataTable
            caption="Candidates within the search radius"
            columns={forCandidates}
            rows={candidates}
            rowClass={(row) => (row.isStar || row.override === 'reject' ? 'is-quiet' : undefined)}
            {...linked}
          />
        </>
      ),
    ],
    [
      'neighbours',
      `Neighbours ${neighbours.length}`,
      neighbours.length === 0 ? (
        <p className="muted">
          {detail.neighbourRadiusArcsec === null
            ? 'Without a usable distance no neighbour can be told.'
            : 'No galaxy with a velocity lies within the neighbour radius and window.'}
        </p>
      ) : (
        <DataTable
          caption="Neighbours in projection and velocity"
          columns={forNeighbours}
          rows={neighbours}
          rowClass={(row) => (row.qualifies ? undefined : 'is-quiet')}
          {...linked}
        />
      ),
    ],
    [
      'limits',
      `Limits ${limits.length}`,
      <div key="limits" className="stack">
        <DepthTable limits={limits} />
        <LimitTable limits={limits} />
      </div>,
    ],
    ['images', 'Images', <ImagesTab key="images" detail={detail} mayAdd={decisions.mayDecide} />],
    ['line', 'Line', <LineTab key="line" detail={detail} settings={props.settings} mayAdd={decisions.mayDecide} />],
    ['surroundings', 'Surroundings', <MeasuresTable key="surroundings" detail={detail} />],
    ['distance', 'Distance', <DistanceBranches key="distance" detail={detail} />],
    ['stability', 'Stability', <Robustness key="stability" detail={detail} />],
    [
      'history',
      `History ${countOf(said)}`,
      <History
        key="history"
        said={said}
        onTakeBack={decisions.mayDecide ? (path, of) => decisions.ask({ what: 'takeBack', path, of }) : undefined}
      />,
    ],
  ];
  return (
    <Tabs
      id="evidence"
      className="evidence-tabs"
      selectedTabId={props.tab}
      onChange={(id) => props.onTab(String(id))}
      renderActiveTabPanelOnly
    >
      {panels.map(([id, title, panel]) => (
        <Tab key={id} id={id} title={title} panel={<>{panel}</>} />
      ))}
    </Tabs>
  );
}

const countOf = ({ reviews, overrides, doubtWords, remarks, settlement }: Said): number =>
  reviews.length + overrides.length + doubtWords.length + remarks.length + (settlement ? 1 : 0);
