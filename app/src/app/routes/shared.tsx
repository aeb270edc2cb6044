import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { Caution } from '#components/caution/caution.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { Panel } from '#components/panel/panel.tsx';
import { sharedQuery } from '#features/editions/api/editions.ts';
import { Downloads } from '#features/editions/components/downloads.tsx';
import { EditionFacts } from '#features/editions/components/edition-facts.tsx';
import { EntryTable } from '#features/editions/components/entry-table.tsx';
import { MethodsText } from '#features/editions/components/methods-text.tsx';
import '#features/editions/components/editions.css';
import { day } from '#lib/format/time.ts';
import { useTitle } from '#lib/use-title.ts';

/** One edition for the holder of a link: no account, no way into anything else. */
export function Component() {
  const token = useParams()['linkToken']!;
  const { data, error, isPending } = useQuery(sharedQuery(token));
  useTitle(data ? `Edition ${data.edition.number}` : 'Shared edition', data?.edition.surveyName);
  return (
    <div className="guest">
      <header className="guest__bar">
        <span className="guest__name">eremite</span>
        {data && (
          <span className="muted small">
            shared with you until {day(data.expiresAt)}; please do not pass the link on
          </span>
        )}
      </header>
      <main className="page stack" id="content">
        {isPending && <Loading />}
        {error && (
          <>
            <h1>This link opens nothing</h1>
            <ProblemCallout error={error} />
          </>
        )}
        {data && (
          <>
            <div className="page__head" style={{ marginBottom: 0 }}>
              <div>
                <h1>
                  {data.edition.surveyName}, edition {data.edition.number}
                </h1>
                <p className="page__lede">{data.edition.note}</p>
              </div>
            </div>
            <Caution />
            <EntryTable entries={data.edition.list} name={({ verdict }) => verdict.name} />
            <Panel title="Take away">
              <Downloads base={`/shared/${token}`} hasArchive={data.edition.archive !== null} />
            </Panel>
            <Panel title="Methods paragraph">
              <MethodsText text={data.edition.methods} />
            </Panel>
            <Panel title="What it stands on">
              <EditionFacts edition={data.edition} />
            </Panel>
          </>
        )}
      </main>
    </div>
  );
}
