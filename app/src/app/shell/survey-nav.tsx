import type { Survey } from '@eremite/shared/contracts/survey';
import { NavLink } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { mayLead } from '#lib/role.ts';

const groups = (id: string) => [
  {
    name: 'Review',
    links: [
      { to: paths.survey(id), text: 'Overview', end: true },
      { to: paths.detections(id), text: 'Detections' },
      { to: paths.plots(id), text: 'Plots' },
      { to: paths.docket(id), text: 'Docket' },
      { to: paths.shortlist(id), text: 'Shortlist' },
      { to: paths.editions(id), text: 'Editions' },
    ],
  },
  {
    name: 'Evidence',
    links: [
      { to: paths.intakes(id), text: 'Intake' },
      { to: paths.catalogues(id), text: 'Catalogues' },
      { to: paths.criteria(id), text: 'Criteria' },
      { to: paths.runs(id), text: 'Runs' },
    ],
  },
  {
    name: 'Record',
    links: [
      { to: paths.ledger(id), text: 'Ledger' },
      { to: paths.people(id), text: 'People' },
      { to: paths.surveySettings(id), text: 'Settings' },
    ],
  },
];

/** Places that only a lead can use. */
const FOR_LEADS = ['Intake', 'Settings'];

/** The places of a survey, in the order of the work; nobody is led to where he can do nothing. */
export function SurveyNav({ survey }: { survey: Survey }) {
  return (
    <nav className="shell__nav" aria-label="Survey">
      {groups(survey.id).map(({ name, links }) => (
        <ul key={name} aria-label={name}>
          {links
            .filter(({ text }) => !FOR_LEADS.includes(text) || mayLead(survey.role))
            .map(({ to, text, end }) => (
              <li key={to}>
                <NavLink to={to} end={end ?? false}>
                  {text}
                </NavLink>
              </li>
            ))}
        </ul>
      ))}
    </nav>
  );
}
