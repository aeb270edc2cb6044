import type { Candidate, VerdictDetail } from '@eremite/shared/contracts/verdict';
import { rowKey } from '@eremite/shared/drawing/sky-mark';
import { useMemo } from 'react';
import type { CommandId } from '#lib/keys/commands.ts';
import type { Command } from '../components/commands-bar.tsx';
import type { Decisions } from './use-decisions.ts';
import type { useShortlisting } from './use-shortlisting.ts';

const TABS: readonly [CommandId, string][] = [
  ['tabCandidates', 'candidates'],
  ['tabNeighbours', 'neighbours'],
  ['tabLimits', 'limits'],
  ['tabStability', 'stability'],
  ['tabHistory', 'history'],
];

interface CommandContext {
  detail: VerdictDetail;
  decisions: Decisions;
  shortlisting: ReturnType<typeof useShortlisting>;
  chosen: Candidate | undefined;
  onChoose: (key: string) => void;
  onTab: (tab: string) => void;
  onNext: () => void;
  onPrevious: () => void;
  onBack: () => void;
  /** Goes to a detection whose decision was taken back. */
  onReturn: (detectionId: string) => void;
}

/** What each key does on this detection, for this person. */
export function useCommands(context: CommandContext): Command[] {
  const { detail, decisions, shortlisting, chosen, onChoose, onTab, onNext, onPrevious, onBack, onReturn } = context;
  return useMemo(() => {
    const { mayDecide, maySettle, isPending, ask, asking, decideAndGo, undo } = decisions;
    const { verdict, candidates, doubts, runId } = detail;
    const off = isPending || asking !== null;
    const agree = () => {
      const { starlight, surroundings, name } = verdict;
      const done = `You agreed: ${starlight}, ${surroundings}.`;
      const json = { runId, starlight, surroundings, note: '' };
      decideAndGo({ path: 'reviews', json, what: `Agreeing with ${name}`, done, advances: true });
    };
    const choose = (by: 1 | -1) => () => {
      const at = chosen ? candidates.indexOf(chosen) : by > 0 ? -1 : candidates.length;
      const next = candidates[at + by];
      if (!next) return;
      onTab('candidates');
      onChoose(rowKey(next));
    };
    const worst =
      doubts.find(({ grade }) => grade === 'serious') ?? doubts.find(({ grade }) => grade === 'watch') ?? doubts[0];
    const onCandidate = (what: 'accept' | 'reject') => () => chosen && ask({ what, candidate: chosen });
    const all: (Command | false)[] = [
      mayDecide && { id: 'agree', onBar: true, run: agree },
      mayDecide && { id: 'override', onBar: true, run: () => ask({ what: 'review' }) },
      mayDecide && { id: 'agreeWithNote', onBar: true, run: () => ask({ what: 'note' }) },
      mayDecide && { id: 'noGalaxy', run: () => ask({ what: 'noGalaxy' }) },
      mayDecide && { id: 'askSpectrum', run: () => ask({ what: 'askSpectrum' }) },
      maySettle && { id: 'settle', onBar: true, run: () => ask({ what: 'settle' }) },
      maySettle && {
        id: 'shortlist',
        label: shortlisting.isOn ? 'off the shortlist' : 'shortlist',
        onBar: true,
        disabled: shortlisting.isPending,
        run: shortlisting.toggle,
      },
      mayDecide && { id: 'undo', run: () => undo(onReturn) },
      { id: 'nextCandidate', run: choose(1) },
      { id: 'previousCandidate', run: choose(-1) },
      mayDecide && { id: 'acceptCandidate', disabled: !chosen, run: onCandidate('accept') },
      mayDecide && { id: 'rejectCandidate', disabled: !chosen, run: onCandidate('reject') },
      mayDecide && worst !== undefined && { id: 'doubt', run: () => ask({ what: 'doubt', doubt: worst }) },
      mayDecide && { id: 'ask', run: () => ask({ what: 'ask' }) },
      ...TABS.map(([id, tab]): Command => ({ id, run: () => onTab(tab) })),
      { id: 'previous', onBar: true, run: onPrevious },
      { id: 'next', onBar: true, run: onNext },
      { id: 'list', run: onBack },
    ];
    return all
      .filter((command): command is Command => command !== false)
      .map((command) => ({ ...command, disabled: off || (command.disabled ?? false) }));
  }, [detail, decisions, shortlisting, chosen, onChoose, onTab, onNext, onPrevious, onBack, onReturn]);
}
