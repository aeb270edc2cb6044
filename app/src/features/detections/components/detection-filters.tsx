import { HTMLSelect } from '@blueprintjs/core';
import type { Run } from '@eremite/shared/contracts/run';
import { STARLIGHT_VERDICTS, SURROUNDINGS_VERDICTS } from '@eremite/shared/contracts/words';
import { useCallback } from 'react';
import { ChoiceChips } from '#components/filters/choice-chips.tsx';
import { SearchField } from '#components/filters/search-field.tsx';
import { useSearchFilters } from '#components/filters/use-search-filters.ts';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';

/** What narrows the list of detections; all of it lives in the address. */
export function DetectionFilters({ run }: { run: Run }) {
  const { search, set, list, toggle } = useSearchFilters();
  const lookFor = useCallback((text: string) => set({ search: text }, { replace: true }), [set]);
  return (
    <div className="stack" style={{ gap: 8, marginBottom: 12 }}>
      <div className="filters" style={{ marginBottom: 0 }}>
        <SearchField label="Find a name" value={search.get('search') ?? ''} onChange={lookFor} />
        <HTMLSelect
          aria-label="Doubts"
          value={search.get('doubtGrade') ?? ''}
          onChange={(event) => set({ doubtGrade: event.target.value })}
          options={[
            { value: '', label: 'Any doubts' },
            { value: 'serious', label: 'With a serious doubt' },
            { value: 'watch', label: 'With a doubt to watch' },
          ]}
        />
        <HTMLSelect
          aria-label="Reviews"
          value={search.get('reviewed') ?? ''}
          onChange={(event) => set({ reviewed: event.target.value })}
          options={[
            { value: '', label: 'Reviewed or not' },
            { value: 'yes', label: 'Reviewed' },
            { value: 'no', label: 'Not yet reviewed' },
          ]}
        />
        <HTMLSelect
          aria-label="Least P(none)"
          value={search.get('minPNone') ?? ''}
          onChange={(event) => set({ minPNone: event.target.value })}
          options={[
            { value: '', label: 'Any P(none)' },
            ...['0.1', '0.5', '0.8', '0.95'].map((value) => ({ value, label: `P(none) at least ${value}` })),
          ]}
        />
      </div>
      <ChoiceChips
        label="Starlight verdict"
        choices={STARLIGHT_VERDICTS}
        chosen={list('starlight')}
        counts={run.counts?.starlight}
        render={(verdict) => <StarlightWord verdict={verdict} size={15} />}
        onToggle={(verdict) => toggle('starlight', verdict)}
      />
      <ChoiceChips
        label="Surroundings verdict"
        choices={SURROUNDINGS_VERDICTS}
        chosen={list('surroundings')}
        counts={run.counts?.surroundings}
        render={(verdict) => <SurroundingsWord verdict={verdict} size={15} />}
        onToggle={(verdict) => toggle('surroundings', verdict)}
      />
    </div>
  );
}
