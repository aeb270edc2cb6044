import { Button } from '@blueprintjs/core';
import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useNavigate, useParams, type LoaderFunctionArgs } from 'react-router-dom';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { criteriaQuery } from '#features/criteria/api/criteria.ts';
import { CriteriaSheet } from '#features/criteria/components/criteria-sheet.tsx';
import { paths } from '#config/paths.ts';
import { moment } from '#lib/format/time.ts';
import { mayLead } from '#lib/role.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(criteriaQuery(params['criteriaId']!));

export function Component() {
  const survey = useSurvey();
  const { data: criteria } = useSuspenseQuery(criteriaQuery(useParams()['criteriaId']!));
  const navigate = useNavigate();
  useTitle(`Criteria ${criteria.number}`, survey.name);
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Criteria {criteria.number}</h1>
          <p className="page__lede">
            Saved by {criteria.createdBy}, {moment(criteria.createdAt)}. {criteria.note}
          </p>
        </div>
        {mayLead(survey.role) && (
          <Button
            text="Edit as the next number"
            onClick={() => void navigate(paths.newCriteria(survey.id, criteria.id))}
          />
        )}
      </div>
      <CriteriaSheet settings={criteria.settings} />
    </div>
  );
}
