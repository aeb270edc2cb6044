import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { Loading } from '#components/feedback/loading.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { criteriaQuery } from '#features/criteria/api/criteria.ts';
import { CriteriaForm } from '#features/criteria/components/criteria-form.tsx';
import { paths } from '#config/paths.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const survey = useSurvey();
  const [search] = useSearchParams();
  const from = search.get('from');
  const base = useQuery({ ...criteriaQuery(from ?? ''), enabled: from !== null });
  const navigate = useNavigate();
  useTitle('New criteria', survey.name);
  if (from !== null && base.isPending) return <Loading />;
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>New criteria</h1>
          <p className="page__lede">
            {base.data ? `Begun from criteria ${base.data.number}.` : 'Begun from the published defaults.'} Every value
            carries its source.
          </p>
        </div>
      </div>
      <CriteriaForm
        survey={survey}
        start={base.data?.settings ?? criteriaSettings.parse({})}
        onSaved={({ number }) => {
          void say(`Saved as criteria ${number}.`);
          void navigate(paths.criteria(survey.id));
        }}
      />
    </div>
  );
}
