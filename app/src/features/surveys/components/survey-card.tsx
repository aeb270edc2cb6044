import type { Survey } from '@eremite/shared/contracts/survey';
import { Link } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { count } from '#lib/format/number.ts';
import { day } from '#lib/format/time.ts';

const lastRun = (survey: Survey) => {
  if (!survey.latestRun) return 'no run yet';
  const { number, state, finishedAt } = survey.latestRun;
  return state === 'done' ? `run ${number} · ${day(finishedAt)}` : `run ${number} · ${state}`;
};

export function SurveyCard({ survey }: { survey: Survey }) {
  return (
    <li className="survey-card">
      <h2>
        <Link to={paths.survey(survey.id)}>{survey.name}</Link>
      </h2>
      <p className="survey-card__team">
        {survey.teamName} · you are {survey.role}
      </p>
      {survey.description && <p className="survey-card__text">{survey.description}</p>}
      <dl className="survey-card__figures">
        <div>
          <dt>detections</dt>
          <dd className="num">{count(survey.detections)}</dd>
        </div>
        <div>
          <dt>catalogues</dt>
          <dd className="num">{count(survey.catalogues)}</dd>
        </div>
        <div>
          <dt>latest</dt>
          <dd className="num">{lastRun(survey)}</dd>
        </div>
      </dl>
    </li>
  );
}
