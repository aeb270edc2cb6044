import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { useState } from 'react';
import { LimitsChart } from '#components/limits-chart/limits-chart.tsx';
import { chosenCandidate, useDecisions } from '../hooks/use-decisions.ts';
import { useCommands } from '../hooks/use-commands.ts';
import { useSaid } from '../hooks/use-said.ts';
import { useShortlisting } from '../hooks/use-shortlisting.ts';
import { CommandsBar } from './commands-bar.tsx';
import { DecisionDialogs } from './decision-dialogs.tsx';
import { DetectionHead } from './detection-head.tsx';
import { DoubtList } from './doubt-list.tsx';
import { EvidenceTabs } from './evidence-tabs.tsx';
import { Grounds } from './grounds.tsx';
import { Notices } from './notices.tsx';
import { SkyEvidence } from './sky-evidence.tsx';
import { VerdictSummary } from './verdict-summary.tsx';

interface DetectionViewProps {
  detail: VerdictDetail;
  surveyId: string;
  teamId: string;
  role: TeamRole;
  settings: CriteriaSettings | undefined;
  catalogues: readonly Catalogue[] | undefined;
  tab: string;
  onTab: (tab: string) => void;
  onNext: () => void;
  onPrevious: () => void;
  onBack: () => void;
  onReturn: (detectionId: string) => void;
  newerRun: { number: number; to: string } | undefined;
}

/** One detection with all that speaks for and against it, and the means to decide. */
export function DetectionView(props: DetectionViewProps) {
  const { detail, surveyId, role, settings, catalogues, tab, onTab, onNext, onPrevious, onBack } = props;
  const id = detail.verdict.detectionId;
  const [hovered, setHovered] = useState<string | null>(null);
  const [selected, setSelected] = useState<string | null>(null);
  const decisions = useDecisions(detail, role, onNext);
  const shortlisting = useShortlisting(surveyId, detail);
  const said = useSaid(id);
  const link = { hovered, selected, onHover: setHovered, onSelect: setSelected };
  const chosen = chosenCandidate(detail, selected);

  const commands = useCommands({
    detail,
    decisions,
    shortlisting,
    chosen,
    onChoose: setSelected,
    onTab,
    onNext,
    onPrevious,
    onBack,
    onReturn: props.onReturn,
  });

  return (
    <>
      <div className="det">
        <div className="det__sky">
          <DetectionHead
            detail={detail}
            onDistance={decisions.mayDecide ? () => decisions.ask({ what: 'distance' }) : undefined}
          />
          <SkyEvidence detail={detail} settings={settings} catalogues={catalogues} {...link} />
        </div>
        <div className="det__evidence">
          <Notices detail={detail} said={said} newerRun={props.newerRun} />
          <VerdictSummary detail={detail} />
          <Grounds verdict={detail.verdict} />
          <div className="det__twin">
            <section aria-labelledby="silence">
              <h3 id="silence">What silence is worth here</h3>
              {detail.limits.length > 0 ? (
                <LimitsChart detail={detail} />
              ) : (
                <p className="muted">No catalogue with a band was searched.</p>
              )}
            </section>
            <DoubtList
              doubts={detail.doubts}
              words={said.doubtWords}
              onDecide={decisions.mayDecide ? (doubt) => decisions.ask({ what: 'doubt', doubt }) : undefined}
            />
          </div>
          <EvidenceTabs
            detail={detail}
            settings={settings}
            decisions={decisions}
            said={said}
            tab={tab}
            onTab={onTab}
            {...link}
          />
        </div>
      </div>
      <CommandsBar commands={commands} />
      <DecisionDialogs detail={detail} surveyId={surveyId} teamId={props.teamId} decisions={decisions} said={said} />
    </>
  );
}
