import type { Job } from '@eremite/shared/contracts/job';
import { publishResult } from '@eremite/shared/contracts/intake';
import { useQueryClient, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { intakeQuery } from '#features/intake/api/intakes.ts';
import { IntakeWizard } from '#features/intake/components/intake-wizard.tsx';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { fileSize } from '#lib/format/time.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(intakeQuery(params['intakeId']!));

export function Component() {
  const survey = useSurvey();
  const intakeId = useParams()['intakeId']!;
  const { data: intake } = useSuspenseQuery(intakeQuery(intakeId));
  const client = useQueryClient();
  const navigate = useNavigate();
  useTitle(intake.fileName, 'Intake', survey.name);
  const published = (job: Job) => {
    const result = publishResult.safeParse(job.result);
    void client.invalidateQueries({ queryKey: ['survey', survey.id] });
    void client.invalidateQueries({ queryKey: ['intake', intakeId] });
    void say(
      result.success
        ? `Published ${count(result.data.rows)} rows; ${count(result.data.sidelined)} sidelined.`
        : 'Published.',
    );
    void navigate(result.success ? paths.catalogue(survey.id, result.data.catalogueId) : paths.catalogues(survey.id));
  };
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>{intake.fileName}</h1>
          <p className="page__lede num small">
            {intake.format} · {fileSize(intake.bytes)} · {count(intake.rows)} rows · {count(intake.columns.length)}{' '}
            columns
          </p>
        </div>
        <Link to={paths.intakes(survey.id)}>All tables</Link>
      </div>
      <IntakeWizard
        key={intake.id}
        intake={intake}
        supersedes={useSearchParams()[0].get('supersedes') ?? undefined}
        onPublished={published}
        onDiscarded={() => void navigate(paths.intakes(survey.id))}
      />
    </div>
  );
}
