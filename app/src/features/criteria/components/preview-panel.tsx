import { HTMLSelect, Spinner } from '@blueprintjs/core';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Survey } from '@eremite/shared/contracts/survey';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { SearchField } from '#components/filters/search-field.tsx';
import { useSettled } from '#lib/use-settled.ts';
import { previewQuery } from '../api/preview.ts';
import { usePreviewed } from '../hooks/use-previewed.ts';
import { isMoved } from '../hooks/is-moved.ts';
import { PreviewItem } from './preview-item.tsx';
import { ScaleNote } from './scale-note.tsx';
import './preview.css';

interface PreviewPanelProps {
  survey: Survey;
  /** Undefined while a value is out of range. */
  settings: CriteriaSettings | undefined;
}

const ORDERS = [
  { value: '-pNone', label: 'likeliest without stars' },
  { value: 'docket', label: 'first of the docket' },
  { value: 'pAlone', label: 'least alone' },
  { value: '-logHiMass', label: 'heaviest' },
];
/** Wait for the end of typing. */
const PAUSE_MS = 600;

const middleOf = (values: readonly (number | null)[]): number | undefined => {
  const known = values.filter((value) => value !== null).sort((a, b) => a - b);
  return known[Math.floor(known.length / 2)];
};

/** What a few detections would become under the criteria as they stand in the form. */
export function PreviewPanel({ survey, settings }: PreviewPanelProps) {
  const [sort, setSort] = useState('-pNone');
  const [search, setSearch] = useState('');
  const previewed = usePreviewed(survey.id, sort, search);
  const [valid, setValid] = useState(settings);
  if (settings && settings !== valid) setValid(settings);
  const settled = useSettled(valid, PAUSE_MS);
  const query = useQuery({
    ...previewQuery(survey.id, settled!, previewed.ids ?? []),
    enabled: settled !== undefined && (previewed.ids?.length ?? 0) > 0,
  });
  const items = previewed.ids?.length === 0 ? [] : (query.data?.items ?? []);
  const isBehind = query.isFetching || settled !== valid;
  return (
    <aside className="panel preview" aria-labelledby="preview-title">
      <div className="panel__head">
        <h2 id="preview-title">Preview</h2>
        <span role="status" className="small muted">
          {!isBehind && items.length > 0 && `${items.filter(isMoved).length} of ${items.length} change`}
        </span>
        {isBehind && <Spinner size={14} aria-label="Scoring again" />}
      </div>
      <div className="panel__body stack">
        {valid && (
          <ScaleNote
            settings={valid}
            h0={survey.cosmology.h0}
            typicalMpc={middleOf(items.map(({ distance }) => distance.angularMpc))}
            typicalArcsec={middleOf(items.map(({ searchRadiusArcsec }) => searchRadiusArcsec))}
          />
        )}
        <div className="row preview__choice">
          {previewed.hasRun && (
            <HTMLSelect
              aria-label="Which detections"
              options={ORDERS}
              value={sort}
              onChange={(event) => setSort(event.target.value)}
            />
          )}
          <SearchField label="Find a name" value={search} onChange={setSearch} />
        </div>
        <ProblemCallout error={query.error} />
        {previewed.ids?.length === 0 ? (
          <p className="muted">{search ? 'No detection has such a name.' : 'No detections yet to preview.'}</p>
        ) : (
          <ul className="preview__items" aria-busy={isBehind}>
            {items.map((item) => (
              <PreviewItem key={item.verdict.detectionId} surveyId={survey.id} item={item} />
            ))}
          </ul>
        )}
        {query.data && items.length > 0 && (
          <details className="small muted">
            <summary>In what it may differ from a run</summary>
            <ul>
              {query.data.notes.map((note) => (
                <li key={note}>{note}</li>
              ))}
            </ul>
          </details>
        )}
      </div>
    </aside>
  );
}
