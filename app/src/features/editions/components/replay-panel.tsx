import { Button, Callout } from '@blueprintjs/core';
import { replayResult, type ReplayResult } from '@eremite/shared/contracts/edition';
import type { Job } from '@eremite/shared/contracts/job';
import { useCallback, useState } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { JobProgress } from '#components/job-progress/job-progress.tsx';
import { useReplay } from '../api/editions.ts';

/** Repeats the edition from the inputs in its archive and says whether every number comes out again. */
export function ReplayPanel({
  editionId,
  isReady,
  mayCancel,
}: {
  editionId: string;
  isReady: boolean;
  mayCancel: boolean;
}) {
  const replay = useReplay(editionId);
  const [result, setResult] = useState<ReplayResult | null>(null);
  const jobId = replay.data?.jobId;
  const onEnd = useCallback((job: Job) => setResult(replayResult.safeParse(job.result).data ?? null), []);
  return (
    <div className="stack">
      <p className="muted">
        Reads the tables of the archive anew, scores every detection anew and compares all numbers. The same is done
        without this service by <code className="mono">npm run replay -- edition.zip</code>.
      </p>
      <div className="row">
        <Button
          text="Repeat from the inputs"
          disabled={!isReady}
          loading={replay.isPending}
          onClick={() => {
            setResult(null);
            replay.mutate();
          }}
        />
      </div>
      <ProblemCallout error={replay.error} />
      {jobId && !result && (
        <JobProgress key={jobId} jobId={jobId} title="Repeating the edition" mayCancel={mayCancel} onEnd={onEnd} />
      )}
      {result && (
        <Callout
          icon={null}
          intent={result.identical ? 'success' : 'warning'}
          role="status"
          title={result.identical ? 'Identical' : 'It differs'}
        >
          {result.sentence}
          {result.differences.length > 0 && (
            <ul>
              {result.differences.map((difference) => (
                <li key={difference} className="mono small">
                  {difference}
                </li>
              ))}
            </ul>
          )}
        </Callout>
      )}
    </div>
  );
}
