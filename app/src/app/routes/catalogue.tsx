import { Button } from '@blueprintjs/core';
import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, useParams, type LoaderFunctionArgs } from 'react-router-dom';
import { CoverageMap } from '#components/coverage-map/coverage-map.tsx';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { MagnitudeHistogram } from '#components/magnitude-histogram/magnitude-histogram.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { magnitudesQuery, useRemoveCatalogue } from '#features/catalogues/api/catalogue-data.ts';
import { CatalogueFacts } from '#features/catalogues/components/catalogue-facts.tsx';
import { CatalogueRows } from '#features/catalogues/components/catalogue-rows.tsx';
import { SidelinedRows } from '#features/catalogues/components/sidelined-rows.tsx';
import { paths } from '#config/paths.ts';
import { catalogueQuery } from '#lib/queries/catalogues.ts';
import { mayLead } from '#lib/role.ts';
import { say } from '#lib/toaster.ts';
import { useTitle } from '#lib/use-title.ts';
import '#features/catalogues/components/catalogues.css';

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.ensureQueryData(catalogueQuery(params['catalogueId']!));

export function Component() {
  const survey = useSurvey();
  const { data: catalogue } = useSuspenseQuery(catalogueQuery(useParams()['catalogueId']!));
  const { data: magnitudes } = useQuery(magnitudesQuery(catalogue.id));
  const remove = useRemoveCatalogue(survey.id);
  const [asking, setAsking] = useState(false);
  const navigate = useNavigate();
  useTitle(catalogue.name, 'Catalogues', survey.name);
  const gone = () => {
    void say(`${catalogue.name} is removed.`);
    void navigate(paths.catalogues(survey.id));
  };
  return (
    <div className="page stack">
      <div className="page__head" style={{ marginBottom: 0 }}>
        <div>
          <h1>{catalogue.name}</h1>
          {catalogue.state === 'superseded' && (
            <p className="page__lede">
              Superseded by a newer version: kept for the runs that read it, used by no further one.
            </p>
          )}
        </div>
        {mayLead(survey.role) && (
          <div className="row">
            {catalogue.state === 'published' && (
              <Link to={paths.intakes(survey.id, catalogue.id)}>Bring in a new version</Link>
            )}
            {catalogue.usedByRuns === 0 && <Button intent="danger" text="Remove" onClick={() => setAsking(true)} />}
          </div>
        )}
      </div>
      <div className="catalogue-grid">
        <Panel title="What it is">
          <CatalogueFacts catalogue={catalogue} />
        </Panel>
        <div className="stack">
          {catalogue.coverage.moc && (
            <Panel title="Where it looked">
              <CoverageMap moc={catalogue.coverage.moc} />
            </Panel>
          )}
          {magnitudes && magnitudes.bands.length > 0 && (
            <Panel title="Magnitudes">
              <div className="stack">
                {magnitudes.bands.map((band) => (
                  <MagnitudeHistogram key={band.band} band={band} />
                ))}
              </div>
            </Panel>
          )}
        </div>
      </div>
      <Panel title="Rows">
        <CatalogueRows catalogue={catalogue} />
      </Panel>
      <Panel title="Sidelined rows">
        <SidelinedRows catalogue={catalogue} />
      </Panel>
      <NoteDialog
        isOpen={asking}
        title={`Remove ${catalogue.name}?`}
        doIt="Remove"
        danger
        withoutNote
        isPending={remove.isPending}
        error={remove.error}
        onClose={() => setAsking(false)}
        onConfirm={() => remove.mutate(catalogue.id, { onSuccess: gone })}
      >
        <p>
          Its rows are removed from the survey. No run uses it, so no verdict changes; its file stays in the intake and
          can be published again.
        </p>
      </NoteDialog>
    </div>
  );
}
