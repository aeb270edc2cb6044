import { FormGroup, HTMLSelect, InputGroup } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { useCallback } from 'react';
import { SearchField } from '#components/filters/search-field.tsx';
import type { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { API_BASE } from '#config/paths.ts';
import { searchString } from '#lib/search-string.ts';
import { ledgerFacetsQuery } from '../api/ledger.ts';

interface LedgerFiltersProps {
  surveyId: string;
  filters: ReturnType<typeof useSearchFilters>;
  /** What is filtered by, for the export of the same lines. */
  filter: Record<string, string>;
}

/** Who did what, when, on what; and the same lines as a file. */
export function LedgerFilters({ surveyId, filters: { search, set }, filter }: LedgerFiltersProps) {
  const { data: facets } = useQuery(ledgerFacetsQuery(surveyId));
  const onSearch = useCallback((value: string) => set({ search: value }, { replace: true }), [set]);
  const choose = (key: 'actor' | 'action', label: string, any: string, values: readonly string[] = []) => (
    <FormGroup label={label} labelFor={`ledger-${key}`} inline>
      <HTMLSelect
        id={`ledger-${key}`}
        value={search.get(key) ?? ''}
        options={[{ value: '', label: any }, ...values.map((value) => ({ value, label: value }))]}
        onChange={(event) => set({ [key]: event.target.value })}
      />
    </FormGroup>
  );
  const day = (key: 'since' | 'until', label: string) => (
    <FormGroup label={label} labelFor={`ledger-${key}`} inline>
      <InputGroup
        id={`ledger-${key}`}
        type="date"
        value={search.get(key) ?? ''}
        onChange={(event) => set({ [key]: event.target.value })}
      />
    </FormGroup>
  );
  const file = (format: string) =>
    `${API_BASE}/surveys/${surveyId}/ledger/export${searchString({ ...filter, format })}`;
  return (
    <div className="ledger-filters">
      {choose('actor', 'Who', 'anyone', facets?.actors)}
      {choose('action', 'What', 'anything', facets?.actions)}
      {day('since', 'From')}
      {day('until', 'To')}
      <SearchField label="On or why" value={search.get('search') ?? ''} onChange={onSearch} />
      <span className="grow" />
      <span>
        Save these as{' '}
        <a href={file('csv')} download>
          CSV
        </a>{' '}
        or, with all that the hashes cover, as{' '}
        <a href={file('jsonl')} download>
          JSON lines
        </a>
      </span>
    </div>
  );
}
