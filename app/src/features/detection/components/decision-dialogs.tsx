import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import type { Decisions } from '../hooks/use-decisions.ts';
import { DistanceDialog } from './distance-dialog.tsx';
import { VerdictDialog } from './verdict-dialog.tsx';

/** The one question that is open at a time. */
export function DecisionDialogs({ detail, decisions }: { detail: VerdictDetail; decisions: Decisions }) {
  const { asking, close, isPending, error } = decisions;
  if (!asking) return null;
  const { verdict } = detail;
  const common = { isOpen: true, isPending, error, onClose: close };
  switch (asking.what) {
    case 'distance':
      return <DistanceDialog detectionId={verdict.detectionId} isOpen onClose={close} />;
    case 'note':
      return <NoteDialog {...common} title="Agree, with a note" doIt="Agree" onConfirm={decisions.agree} />;
    case 'review':
    case 'settle':
      return (
        <VerdictDialog
          {...common}
          title={asking.what === 'review' ? `Override the verdict on ${verdict.name}` : `Settle ${verdict.name}`}
          doIt={asking.what === 'review' ? 'Override' : 'Settle'}
          starlight={verdict.starlight}
          surroundings={verdict.surroundings}
          onConfirm={asking.what === 'review' ? decisions.review : decisions.settle}
        />
      );
    case 'withdraw':
      return (
        <NoteDialog
          {...common}
          title="Withdraw the override"
          doIt="Withdraw"
          danger
          onConfirm={(note) => decisions.withdraw(asking.override, note)}
        >
          <p>{asking.override.objectName} goes back to its computed probability in the next run.</p>
        </NoteDialog>
      );
    default: {
      const { what, candidate } = asking;
      return (
        <NoteDialog
          {...common}
          title={what === 'accept' ? `Make ${candidate.name} the counterpart` : `Reject ${candidate.name}`}
          doIt={what === 'accept' ? 'Make it the counterpart' : 'Reject it'}
          onConfirm={(note) => decisions.override(what, candidate, note)}
        >
          <p className="muted">This run keeps its verdict; the next one takes your word, and says so in its grounds.</p>
        </NoteDialog>
      );
    }
  }
}
