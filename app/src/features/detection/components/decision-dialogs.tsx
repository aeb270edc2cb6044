import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { draftOf, type Decision, type Decisions } from '../hooks/use-decisions.ts';
import { DecisionDialog } from './decision-dialog.tsx';
import { DistanceDialog } from './distance-dialog.tsx';
import type { Said } from './history.tsx';
import { DoubtDialog } from './doubt-dialog.tsx';
import { RemarkDialog } from './remark-dialog.tsx';
import { VerdictDialog, type Words } from './verdict-dialog.tsx';

interface DecisionDialogsProps {
  detail: VerdictDetail;
  surveyId: string;
  teamId: string;
  decisions: Decisions;
  /** What is on the page: a word that was seen may be replaced. */
  said: Said;
}

/** The one question that is open at a time. */
export function DecisionDialogs({ detail, surveyId, teamId, decisions, said }: DecisionDialogsProps) {
  const { asking, decide } = decisions;
  if (!asking) return null;
  const { verdict, runId } = detail;
  const { name, detectionId, starlight, surroundings } = verdict;
  const computed = { starlight, surroundings };
  const common = { surveyId, detectionId, decisions, draft: draftOf(detectionId, asking.what) };
  const review = (words: Words, note: string, attachmentIds: string[], done: string): Decision => ({
    path: 'reviews',
    json: { runId, ...words, note, attachmentIds },
    what: `Your verdict on ${name}`,
    done,
    advances: true,
    draft: common.draft,
  });
  switch (asking.what) {
    case 'distance':
      return <DistanceDialog detectionId={detectionId} isOpen onClose={decisions.close} />;
    case 'note':
      return (
        <DecisionDialog
          {...common}
          title="Agree, with a note"
          doIt="Agree"
          onConfirm={(note, files) =>
            decide(
              review({ ...computed, outcome: 'verdict' }, note, files, `You agreed: ${starlight}, ${surroundings}.`),
            )
          }
        />
      );
    case 'review':
    case 'noGalaxy':
    case 'askSpectrum':
      return (
        <VerdictDialog
          {...common}
          key={asking.what}
          title={asking.what === 'review' ? `Override the verdict on ${name}` : `In place of a verdict on ${name}`}
          doIt={asking.what === 'review' ? 'Override' : 'Answer'}
          computed={computed}
          outcome={
            asking.what === 'review' ? 'verdict' : asking.what === 'noGalaxy' ? 'not real' : 'needs an HI spectrum'
          }
          mayAgree={false}
          onConfirm={(words, note, files) => decide(review(words, note, files, `Your verdict on ${name} is kept.`))}
        />
      );
    case 'settle':
      return (
        <VerdictDialog
          {...common}
          title={`Settle ${name}`}
          doIt="Settle"
          computed={computed}
          outcome="verdict"
          mayAgree
          onConfirm={(words, note, attachmentIds, over) =>
            decide(
              {
                path: 'settlements',
                json: { runId, ...words, note, attachmentIds },
                what: `Settling ${name}`,
                done: 'Settled.',
                draft: common.draft,
              },
              over ?? said.settlement?.id,
            )
          }
        />
      );
    case 'doubt':
      return (
        <DoubtDialog
          {...common}
          runId={runId}
          doubts={detail.doubts}
          first={asking.doubt}
          name={name}
          words={said.doubtWords}
        />
      );
    case 'ask':
      return <RemarkDialog {...common} name={name} teamId={teamId} />;
    case 'takeBack':
      return (
        <NoteDialog
          isOpen
          isPending={decisions.isPending}
          error={decisions.error}
          onClose={decisions.close}
          title="Take it back"
          doIt="Take it back"
          danger
          onConfirm={(note) => decisions.takeBack(asking.path, note)}
        >
          <p>{asking.of}: the next run goes by what was computed. The history keeps both words.</p>
        </NoteDialog>
      );
    default: {
      const { what, candidate } = asking;
      const { catalogueId, rowId } = candidate;
      const onObject = said.overrides.find(
        (entry) => entry.catalogueId === catalogueId && entry.rowId === rowId && entry.withdrawnAt === null,
      );
      return (
        <DecisionDialog
          {...common}
          draft={draftOf(detectionId, `${what}.${catalogueId}.${rowId}`)}
          title={what === 'accept' ? `Make ${candidate.name} the counterpart` : `Reject ${candidate.name}`}
          doIt={what === 'accept' ? 'Make it the counterpart' : 'Reject it'}
          onConfirm={(note, attachmentIds, over) =>
            decide(
              {
                path: 'overrides',
                json: { catalogueId, rowId, action: what, note, attachmentIds },
                what: `${candidate.name} ${what}ed for ${name}`,
                done: `${candidate.name} is ${what}ed from the next run on.`,
                draft: draftOf(detectionId, `${what}.${catalogueId}.${rowId}`),
              },
              over ?? onObject?.id,
            )
          }
        >
          <p className="muted">This run keeps its verdict; the next one takes your word, and says so in its grounds.</p>
        </DecisionDialog>
      );
    }
  }
}
