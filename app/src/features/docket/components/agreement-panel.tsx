import { agreement, type Agreement } from '@eremite/shared/contracts/agreement';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { call } from '#lib/api-client.ts';
import { count } from '#lib/format/number.ts';

const agreementQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'docket', 'agreement'],
    queryFn: ({ signal }) => call(listOf(agreement), `/surveys/${surveyId}/agreement?limit=200`, { signal }),
  });

const KAPPA =
  "Cohen's kappa: (p_o - p_e)/(1 - p_e), 1 for full agreement, 0 for chance; over what both judged blind. Cohen (1960)";
const kappa = ({ kappa: value, standardError }: Agreement['starlight']) =>
  value === null ? (
    <span className="muted">always one word</span>
  ) : (
    `${value.toFixed(2)} ± ${(standardError ?? 0).toFixed(2)}`
  );
const COLUMNS: Column<Agreement>[] = [
  {
    key: 'pair',
    header: 'Reviewers',
    align: 'left',
    cell: ({ reviewers }) => <span className="prose">{reviewers.join(' and ')}</span>,
  },
  { key: 'detections', header: 'Both judged', cell: ({ detections }) => count(detections) },
  { key: 'same', header: 'Same starlight', cell: ({ starlight }) => `${Math.round(starlight.observed * 100)} %` },
  { key: 'starlight', header: 'κ starlight', hint: KAPPA, cell: ({ starlight }) => kappa(starlight) },
  { key: 'surroundings', header: 'κ surroundings', hint: KAPPA, cell: ({ surroundings }) => kappa(surroundings) },
];

/** How far each two reviewers agree beyond chance. */
export function AgreementPanel({ surveyId }: { surveyId: string }) {
  const { data } = useQuery(agreementQuery(surveyId));
  if (!data || data.items.length === 0) return null;
  return (
    <details className="stack">
      <summary>Agreement of reviewers</summary>
      <DataTable
        caption="Agreement of reviewers"
        columns={COLUMNS}
        rows={data.items}
        rowKey={({ reviewers }) => reviewers.join()}
      />
    </details>
  );
}
