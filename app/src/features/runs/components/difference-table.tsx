import { Link } from 'react-router-dom';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { Prose } from '#components/prose/prose.tsx';
import { paths } from '#config/paths.ts';
import { NO_VALUE, probability } from '#lib/format/number.ts';
import { hasOtherWords, type RunDifference } from '../api/runs.ts';

type Change = RunDifference['changed'][number];

const moved = <T,>(pair: readonly [T, T], text: (value: T) => string) =>
  text(pair[0]) === text(pair[1]) ? (
    <span className="muted">{text(pair[1])}</span>
  ) : (
    `${text(pair[0])} → ${text(pair[1])}`
  );

const columns = (surveyId: string, runId: string, otherwise: string): Column<Change>[] => [
  {
    key: 'name',
    header: 'Detection',
    align: 'left',
    cell: ({ detectionId, name }) => <Link to={paths.detection(surveyId, detectionId, `?run=${runId}`)}>{name}</Link>,
  },
  {
    key: 'starlight',
    header: 'Starlight',
    align: 'left',
    cell: ({ starlight }) => <span className="prose">{moved(starlight, (v) => v ?? 'absent')}</span>,
  },
  {
    key: 'surroundings',
    header: 'Surroundings',
    align: 'left',
    cell: ({ surroundings }) => <span className="prose">{moved(surroundings, (v) => v ?? 'absent')}</span>,
  },
  { key: 'pNone', header: 'P(none)', align: 'left', cell: ({ pNone }) => moved(pNone, probability) },
  {
    key: 'causes',
    header: 'Which input did it',
    align: 'left',
    cell: ({ causes }) => (
      <span className="prose">
        {causes.length > 0 ? causes.join('; ').replaceAll('->', '→') : 'none that is known'}
      </span>
    ),
  },
  {
    key: 'why',
    header: 'What moved',
    align: 'left',
    cell: ({ why }) => <span className="prose">{why.length > 0 ? <Prose text={why.join('; ')} /> : otherwise}</span>,
  },
];

/** The detections that moved between two runs, each with what moved it; those with another verdict first. */
export function DifferenceTable({ surveyId, difference }: { surveyId: string; difference: RunDifference }) {
  // Where no number moved, only the thresholds can have: if they did.
  const otherwise = difference.criteriaChanged.length > 0 ? 'another threshold' : NO_VALUE;
  const sorted = [...difference.changed].sort((a, b) => Number(hasOtherWords(b)) - Number(hasOtherWords(a)));
  return (
    <DataTable
      caption={`Verdicts that differ between run ${difference.from.number} and run ${difference.to.number}`}
      columns={columns(surveyId, difference.to.id, otherwise)}
      rows={sorted}
      rowKey={({ detectionId }) => detectionId}
    />
  );
}
