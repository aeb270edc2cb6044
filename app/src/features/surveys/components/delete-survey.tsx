import { Button } from '@blueprintjs/core';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { complain, say } from '#lib/toaster.ts';
import { useDeleteSurvey, useRestoreSurvey } from '../api/survey-settings.ts';

/** Asks, deletes, and offers to take it back. */
export function DeleteSurvey({ survey }: { survey: Survey }) {
  const [isAsking, setAsking] = useState(false);
  const navigate = useNavigate();
  const remove = useDeleteSurvey();
  const restore = useRestoreSurvey();
  // By its promise: by the time someone takes it back, this component is no longer on the page.
  const undo = () =>
    void restore
      .mutateAsync(survey.id)
      .then(() => navigate(paths.survey(survey.id)))
      .catch(complain);
  const confirm = () =>
    remove.mutate(survey.id, {
      onSuccess: () => {
        void navigate(paths.surveys());
        void say(`${survey.name} is deleted.`, undo);
      },
    });
  return (
    <>
      <p style={{ marginBottom: 12 }}>
        It leaves everyone’s list with its {count(survey.detections)} detections, its runs and its decisions. Nothing is
        erased: a lead can bring it back from the list of surveys.
      </p>
      <Button intent="danger" variant="outlined" text="Delete the survey…" onClick={() => setAsking(true)} />
      <NoteDialog
        isOpen={isAsking}
        title={`Delete ${survey.name}?`}
        doIt="Delete the survey"
        danger
        withoutNote
        isPending={remove.isPending}
        error={remove.error}
        onClose={() => setAsking(false)}
        onConfirm={confirm}
      >
        <p>Reviewers lose sight of it at once, also of what they have open.</p>
      </NoteDialog>
    </>
  );
}
