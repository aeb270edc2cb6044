import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { LimitsChart } from '#components/limits-chart/limits-chart.tsx';
import { overridesQuery, reviewsQuery } from '../api/decisions.ts';
import { chosenCandidate, useDecisions } from '../hooks/use-decisions.ts';
import { useShortlisting } from '../hooks/use-shortlisting.ts';
import { CommandsBar, type Command } from './commands-bar.tsx';
import { DecisionDialogs } from './decision-dialogs.tsx';
import { DetectionHead } from './detection-head.tsx';
import { DoubtList } from './doubt-list.tsx';
import { EvidenceTabs } from './evidence-tabs.tsx';
import { Grounds } from './grounds.tsx';
import { SkyEvidence } from './sky-evidence.tsx';
import { VerdictSummary } from './verdict-summary.tsx';

interface DetectionViewProps {
  detail: VerdictDetail;
  surveyId: string;
  role: TeamRole;
  settings: CriteriaSettings | undefined;
  catalogues: readonly Catalogue[] | undefined;
  tab: string;
  onTab: (tab: string) => void;
  onNext: () => void;
  onPrevious: () => void;
  onBack: () => void;
}

/** One detection with all that speaks for and against it, and the means to decide. */
export function DetectionView(props: DetectionViewProps) {
  const { detail, surveyId, role, settings, catalogues, tab, onTab, onNext, onPrevious, onBack } = props;
  const id = detail.verdict.detectionId;
  const [hovered, setHovered] = useState<string | null>(null);
  const [selected, setSelected] = useState<string | null>(null);
  const decisions = useDecisions(detail, role, onNext);
  const shortlisting = useShortlisting(surveyId, detail);
  const { data: reviews } = useQuery(reviewsQuery(id));
  const { data: overrides } = useQuery(overridesQuery(id));
  const link = { hovered, selected, onHover: setHovered, onSelect: setSelected };
  const chosen = chosenCandidate(detail, selected);

  const commands = useMemo(() => {
    const { mayDecide, maySettle, isPending, agree, ask, asking } = decisions;
    const off = isPending || asking !== null;
    const all: (Command | false)[] = [
      mayDecide && {
        combo: 'enter',
        keyName: 'Enter',
        label: 'agree',
        group: 'Decide',
        disabled: off,
        run: () => agree(),
      },
      mayDecide && {
        combo: 'o',
        keyName: 'O',
        label: 'override…',
        group: 'Decide',
        disabled: off,
        run: () => ask({ what: 'review' }),
      },
      mayDecide && {
        combo: 'n',
        keyName: 'N',
        label: 'agree with a note…',
        group: 'Decide',
        disabled: off,
        run: () => ask({ what: 'note' }),
      },
      maySettle && {
        combo: 's',
        keyName: 'S',
        label: 'settle…',
        group: 'Decide',
        disabled: off,
        run: () => ask({ what: 'settle' }),
      },
      maySettle && {
        combo: 'l',
        keyName: 'L',
        label: shortlisting.isOn ? 'off the shortlist' : 'shortlist',
        group: 'Decide',
        disabled: off || shortlisting.isPending,
        run: shortlisting.toggle,
      },
      mayDecide && {
        combo: 'c',
        keyName: 'C',
        label: 'make the chosen object the counterpart…',
        group: 'Decide',
        hidden: true,
        disabled: off || !chosen,
        run: () => chosen && ask({ what: 'accept', candidate: chosen }),
      },
      mayDecide && {
        combo: 'x',
        keyName: 'X',
        label: 'reject the chosen object…',
        group: 'Decide',
        hidden: true,
        disabled: off || !chosen,
        run: () => chosen && ask({ what: 'reject', candidate: chosen }),
      },
      { combo: 'k', keyName: 'K', label: 'previous', group: 'Move', disabled: off, run: onPrevious },
      { combo: 'j', keyName: 'J', label: 'next', group: 'Move', disabled: off, run: onNext },
      {
        combo: 'arrowleft',
        keyName: '←',
        label: 'previous detection',
        group: 'Move',
        hidden: true,
        disabled: off,
        run: onPrevious,
      },
      {
        combo: 'arrowright',
        keyName: '→',
        label: 'next detection',
        group: 'Move',
        hidden: true,
        disabled: off,
        run: onNext,
      },
      { combo: 'u', keyName: 'U', label: 'up to the list', group: 'Move', hidden: true, disabled: off, run: onBack },
    ];
    return all.filter((command): command is Command => command !== false);
  }, [decisions, shortlisting, chosen, onNext, onPrevious, onBack]);

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
            <DoubtList doubts={detail.doubts} />
          </div>
          <EvidenceTabs
            detail={detail}
            decisions={decisions}
            reviews={reviews?.items ?? []}
            overrides={overrides?.items ?? []}
            tab={tab}
            onTab={onTab}
            {...link}
          />
        </div>
      </div>
      <CommandsBar commands={commands} />
      <DecisionDialogs detail={detail} decisions={decisions} />
    </>
  );
}
