import { Button } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { mayLead } from '#lib/role.ts';
import { complain, say } from '#lib/toaster.ts';
import { deletedSurveysQuery, useRestoreSurvey } from '../api/survey-settings.ts';

/** Surveys a lead may bring back. */
export function DeletedSurveys() {
  const { data } = useQuery(deletedSurveysQuery());
  const restore = useRestoreSurvey();
  const mine = data?.items.filter(({ role }) => mayLead(role)) ?? [];
  if (mine.length === 0) return null;
  return (
    <details className="deleted-surveys">
      <summary>
        {mine.length} deleted {mine.length === 1 ? 'survey' : 'surveys'}
      </summary>
      <ul className="plain-list">
        {mine.map(({ id, name, teamName }) => (
          <li key={id} className="row">
            <span>{name}</span>
            <span className="muted small">{teamName}</span>
            <Button
              size="small"
              text="Restore"
              aria-label={`Restore ${name}`}
              loading={restore.isPending && restore.variables === id}
              onClick={() =>
                restore.mutate(id, {
                  onSuccess: () => void say(`${name} is back.`),
                  onError: (error) => void complain(error),
                })
              }
            />
          </li>
        ))}
      </ul>
    </details>
  );
}
