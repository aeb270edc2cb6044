import type { LedgerEntry } from '@eremite/shared/contracts/ledger';
import { useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { EmptyState } from '#components/feedback/empty-state.tsx';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { Pager } from '#components/filters/pager.tsx';
import { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { useSurvey } from '#components/survey-context/use-survey.ts';
import { ledgerQuery, verificationQuery } from '#features/ledger/api/ledger.ts';
import { LedgerDetail } from '#features/ledger/components/ledger-detail.tsx';
import { LedgerFilters } from '#features/ledger/components/ledger-filters.tsx';
import '#features/ledger/components/ledger.css';
import { count } from '#lib/format/number.ts';
import { moment } from '#lib/format/time.ts';
import { searchString } from '#lib/search-string.ts';
import { useTitle } from '#lib/use-title.ts';

const COLUMNS: Column<LedgerEntry>[] = [
  { key: 'number', header: 'No.', cell: ({ number }) => number },
  { key: 'at', header: 'When', align: 'left', cell: ({ at }) => moment(at) },
  { key: 'actor', header: 'Who', align: 'left', cell: ({ actor }) => <span className="prose">{actor}</span> },
  { key: 'action', header: 'What', align: 'left', cell: ({ action }) => <span className="prose">{action}</span> },
  { key: 'subject', header: 'On', align: 'left', cell: ({ subject }) => subject },
  {
    key: 'note',
    header: 'Why',
    align: 'left',
    cell: ({ note }) => <span className="prose shortlist__reason">{note}</span>,
  },
  {
    key: 'hash',
    header: 'Before, after, hash',
    align: 'left',
    cell: (entry) => <LedgerDetail entry={entry} />,
  },
];

/** Parameters of the address that narrow the ledger. */
const NARROWING = ['actor', 'action', 'since', 'until', 'search'];

export function Component() {
  const survey = useSurvey();
  const filters = useSearchFilters();
  const { search } = filters;
  const filter = Object.fromEntries(NARROWING.flatMap((key) => (search.get(key) ? [[key, search.get(key)!]] : [])));
  const query = useQuery(ledgerQuery(survey.id, searchString({ ...filter, limit: 100, cursor: search.get('cursor') })));
  const { data: chain } = useQuery(verificationQuery(survey.id));
  useTitle('Ledger', survey.name);
  return (
    <div className="page">
      <div className="page__head">
        <div>
          <h1>Ledger</h1>
          <p className="page__lede">
            Every import, run, review and override: who, when, what, why. Nothing is ever taken out.
          </p>
        </div>
        {chain && (
          <p role="status" className={chain.intact ? 'muted' : 'facts__open'}>
            {chain.intact
              ? `The chain of ${count(chain.entries)} entries is intact; it ends in ${chain.lastHash.slice(0, 10)}.`
              : `The chain is broken at entry ${chain.brokenAt}.`}
          </p>
        )}
      </div>
      <LedgerFilters surveyId={survey.id} filters={filters} filter={filter} />
      <ProblemCallout error={query.error} />
      {query.isLoading && <Loading what="Reading the ledger" />}
      {query.data?.items.length === 0 && (
        <EmptyState title={search.size > 0 ? 'No entry fits' : 'Nothing has happened yet'}>
          {search.size > 0 ? 'Ask for less.' : 'The first import will be the first entry.'}
        </EmptyState>
      )}
      {query.data && query.data.items.length > 0 && (
        <>
          <DataTable
            caption="Ledger"
            columns={COLUMNS}
            rows={query.data.items}
            rowKey={({ number }) => String(number)}
            isStale={query.isPlaceholderData}
          />
          <Pager shown={query.data.items.length} total={query.data.total} nextCursor={query.data.nextCursor} />
        </>
      )}
    </div>
  );
}
