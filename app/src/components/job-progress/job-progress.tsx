import { Button, Callout, ProgressBar } from '@blueprintjs/core';
import type { Job } from '@eremite/shared/contracts/job';
import { useMutation, useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { duration } from '#lib/format/time.ts';
import { cancelJob, jobQuery } from '#lib/queries/job.ts';
import { complain } from '#lib/toaster.ts';
import './job-progress.css';

interface JobProgressProps {
  jobId: string;
  title: string;
  mayCancel: boolean;
  /** Called once when the work has ended, however it ended. */
  onEnd?: (job: Job) => void;
}

/** The truth about a piece of long work: how far, how long still, and a way to stop it. */
export function JobProgress({ jobId, title, mayCancel, onEnd }: JobProgressProps) {
  const { data: job } = useQuery(jobQuery(jobId));
  const cancel = useMutation({ mutationFn: () => cancelJob(jobId), onError: (error) => void complain(error) });
  const ended = useRef(false);
  const isOver = job?.state === 'done' || job?.state === 'failed' || job?.state === 'cancelled';
  useEffect(() => {
    if (!job || !isOver || ended.current) return;
    ended.current = true;
    onEnd?.(job);
  }, [job, isOver, onEnd]);

  if (job?.state === 'failed') {
    return (
      <Callout intent="danger" icon={null} role="alert" title={job.error?.title ?? `${title} failed`}>
        {job.error?.detail ?? job.message}
      </Callout>
    );
  }
  const percent = Math.round((job?.progress ?? 0) * 100);
  return (
    <div className="job-progress">
      <div className="row">
        <strong className="grow">{title}</strong>
        <span className="mono small" aria-live="polite">
          {percent} %{left(job)}
        </span>
        {mayCancel && !isOver && (
          <Button size="small" text="Cancel" loading={cancel.isPending} onClick={() => cancel.mutate()} />
        )}
      </div>
      <ProgressBar
        value={job?.progress ?? 0}
        animate={false}
        stripes={false}
        aria-label={title}
        aria-valuetext={`${percent} per cent`}
      />
      <p className="muted small">{job ? stateWords(job) : 'Asking how far it is'}</p>
    </div>
  );
}

const left = (job: Job | undefined) =>
  job?.state === 'running' && job.secondsLeft !== null && job.secondsLeft !== undefined
    ? ` · about ${duration(Math.max(1, job.secondsLeft))} left`
    : '';

function stateWords(job: Job): string {
  if (job.state === 'queued') return 'Waiting for its turn.';
  if (job.state === 'cancelled') return 'Cancelled. Nothing was kept of it.';
  if (job.state === 'done') return 'Done.';
  return job.message || 'Working. You may leave this page; the work goes on.';
}
