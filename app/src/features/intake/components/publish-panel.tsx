import { Button } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { Job } from '@eremite/shared/contracts/job';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { JobProgress } from '#components/job-progress/job-progress.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { useDiscard, usePublish } from '../api/intakes.ts';

interface PublishPanelProps {
  intake: Intake;
  /** What is shown is not what the service has: a check is under way, or the settings were refused. */
  isUnsettled: boolean;
  onPublished: (job: Job) => void;
  onDiscarded: () => void;
}

/** The last step: publish with progress and cancel, or put the file away. */
export function PublishPanel({ intake, isUnsettled, onPublished, onDiscarded }: PublishPanelProps) {
  const publish = usePublish(intake.id);
  const discard = useDiscard(intake.surveyId);
  const [asking, setAsking] = useState(false);
  const [over, setOver] = useState(false);
  const end = (job: Job) => {
    setOver(true);
    if (job.state === 'done') onPublished(job);
  };
  const isRunning = publish.data !== undefined && !over;
  const blocked = isUnsettled || !intake.check.ready || isRunning || intake.state !== 'staged';
  return (
    <div className="stack">
      {publish.data && <JobProgress jobId={publish.data.jobId} title="Publishing" mayCancel onEnd={end} />}
      <ProblemCallout error={publish.error} />
      <div className="row">
        <Button
          intent="primary"
          text={`Publish ${count(intake.check.usable)} rows`}
          disabled={blocked}
          onClick={() => {
            setOver(false);
            publish.mutate();
          }}
        />
        <Button variant="minimal" text="Discard" disabled={isRunning} onClick={() => setAsking(true)} />
      </div>
      {intake.catalogueId && (
        <p className="small">
          It is published: <Link to={paths.catalogue(intake.surveyId, intake.catalogueId)}>to its catalogue</Link>.
        </p>
      )}
      {!intake.check.ready && <p className="muted small">Answer what is marked “Say” first.</p>}
      <NoteDialog
        isOpen={asking}
        title={`Discard ${intake.fileName}?`}
        doIt="Discard"
        danger
        withoutNote
        isPending={discard.isPending}
        error={discard.error}
        onClose={() => setAsking(false)}
        onConfirm={() => discard.mutate(intake.id, { onSuccess: onDiscarded })}
      >
        <p>The uploaded file and its settings are removed. Published catalogues are not touched.</p>
      </NoteDialog>
    </div>
  );
}
