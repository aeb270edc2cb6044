import { Checkbox, FormGroup, HTMLSelect } from '@blueprintjs/core';
import { REVIEW_OUTCOMES } from '@eremite/shared/contracts/review';
import { STARLIGHT_VERDICTS } from '@eremite/shared/contracts/words';
import { useQuery } from '@tanstack/react-query';
import { ChoiceChips } from '#components/filters/choice-chips.tsx';
import { SearchField } from '#components/filters/search-field.tsx';
import type { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { membersQuery } from '#lib/queries/members.ts';
import { useCallback } from 'react';

interface DocketFiltersProps {
  teamId: string;
  mayReview: boolean;
  filters: ReturnType<typeof useSearchFilters>;
  state: string;
  assigned: string;
}

const ORDERS = [
  { value: '', label: 'likely dark first' },
  { value: 'doubt', label: 'worst doubt first' },
  { value: 'disagreement', label: 'disagreement first' },
  { value: 'returned', label: 'come back first' },
  { value: '-pAlone', label: 'most alone first' },
  { value: 'position', label: 'as in the list' },
];

/** What of the docket is shown and in which order; all of it in the address. */
export function DocketFilters({ teamId, mayReview, filters, state, assigned }: DocketFiltersProps) {
  const { search, set, list, toggle } = filters;
  const { data: members } = useQuery(membersQuery(teamId));
  const onSearch = useCallback((value: string) => set({ search: value }, { replace: true }), [set]);
  const choose = (key: string, label: string, options: { value: string; label: string }[], value: string) => (
    <FormGroup label={label} labelFor={`docket-${key}`} inline>
      <HTMLSelect
        id={`docket-${key}`}
        value={value}
        options={options}
        onChange={(event) => set({ [key]: event.target.value })}
      />
    </FormGroup>
  );
  const people = members?.items.filter(({ role }) => role !== 'observer') ?? [];
  return (
    <div className="docket-filters">
      {mayReview &&
        choose(
          'state',
          'Show',
          [
            { value: 'open', label: 'to review' },
            { value: 'done', label: 'reviewed by me' },
            { value: 'all', label: 'all' },
          ],
          state,
        )}
      {choose(
        'assigned',
        'Assigned to',
        [
          { value: 'all', label: 'anyone or nobody' },
          ...(mayReview ? [{ value: 'me', label: 'me' }] : []),
          { value: 'nobody', label: 'nobody' },
          ...people.map(({ userId, name }) => ({ value: userId, label: name })),
        ],
        assigned,
      )}
      {choose('sort', 'Order', ORDERS, search.get('sort') ?? '')}
      {choose(
        'doubtGrade',
        'Doubts',
        [
          { value: '', label: 'any' },
          { value: 'serious', label: 'a serious one' },
          { value: 'watch', label: 'one to watch' },
        ],
        search.get('doubtGrade') ?? '',
      )}
      {choose(
        'outcome',
        'Answered',
        [{ value: '', label: 'anything' }, ...REVIEW_OUTCOMES.map((value) => ({ value, label: value }))],
        search.get('outcome') ?? '',
      )}
      {choose(
        'settled',
        'Settled',
        [
          { value: '', label: 'or not' },
          { value: 'yes', label: 'yes' },
          { value: 'no', label: 'not yet' },
        ],
        search.get('settled') ?? '',
      )}
      <Checkbox
        inline
        label="Evidence moved"
        checked={search.get('returned') === 'yes'}
        onChange={(event) => set({ returned: event.target.checked ? 'yes' : null })}
      />
      <Checkbox
        inline
        label="Reviewers differ"
        checked={search.get('disagreement') === 'yes'}
        onChange={(event) => set({ disagreement: event.target.checked ? 'yes' : null })}
      />
      <SearchField label="Name" value={search.get('search') ?? ''} onChange={onSearch} />
      <ChoiceChips
        label="Starlight verdicts"
        choices={STARLIGHT_VERDICTS}
        chosen={list('starlight')}
        render={(verdict) => verdict}
        onToggle={(verdict) => toggle('starlight', verdict)}
      />
    </div>
  );
}
