import { Button } from '@blueprintjs/core';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useQueryClient } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { surveyQuery } from '#lib/queries/survey.ts';
import { say } from '#lib/toaster.ts';
import { useUpdateSurvey } from '../api/survey-settings.ts';
import { draftOf, requestOf } from '../hooks/survey-draft.ts';
import { SurveyFields } from './survey-fields.tsx';

/** Changes what a survey says of itself. A change made by someone else meanwhile is not overwritten. */
export function SurveySettingsForm({ survey, etag }: { survey: Survey; etag: string }) {
  const [draft, setDraft] = useState(() => draftOf(survey));
  const update = useUpdateSurvey(survey.id);
  const client = useQueryClient();
  const reread = () => client.invalidateQueries({ queryKey: surveyQuery(survey.id).queryKey });
  const isSame = JSON.stringify(draft) === JSON.stringify(draftOf(survey));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    update.mutate({ ...requestOf(draft), etag }, { onSuccess: () => void say('Saved.') });
  };
  return (
    <form onSubmit={submit}>
      <SurveyFields draft={draft} onChange={(change) => setDraft((old) => ({ ...old, ...change }))} />
      <p className="muted small" style={{ marginBottom: 12 }}>
        The cosmology is used from the next run on; runs already made keep theirs.
      </p>
      <div className="stack">
        <ProblemCallout error={update.error} />
        <div className="row">
          <Button type="submit" intent="primary" text="Save" disabled={isSame} loading={update.isPending} />
          {!isSame && <Button variant="minimal" text="Undo the changes" onClick={() => setDraft(draftOf(survey))} />}
          {update.isError && <Button variant="minimal" text="Read the survey again" onClick={() => void reread()} />}
        </div>
      </div>
    </form>
  );
}
