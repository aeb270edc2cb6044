import { Button, FormGroup, InputGroup } from '@blueprintjs/core';
import { observabilityAnswer, type Observability } from '@eremite/shared/contracts/observability';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { DataTable, type Column } from '#components/data-table/data-table.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { call } from '#lib/api-client.ts';
import { fixed, NO_VALUE } from '#lib/format/number.ts';
import { SITE_FIELDS, type SiteDraft, siteQuery, thisSemester } from './site-draft.ts';

const observabilityQuery = (base: string, search: string) =>
  queryOptions({
    queryKey: ['observability', base, search],
    queryFn: ({ signal }) => call(observabilityAnswer, `${base}/observability?${search}`, { signal }),
  });

const columns: Column<Observability>[] = [
  { key: 'name', header: 'Source', align: 'left', cell: ({ name }) => name },
  { key: 'hours', header: 'Dark hours', unit: 'h', cell: ({ hours }) => fixed(hours, 1) },
  { key: 'night', header: 'In its best night', unit: 'h', cell: ({ bestNightHours }) => fixed(bestNightHours, 2) },
  { key: 'best', header: 'Best night', align: 'left', cell: ({ bestNight }) => bestNight ?? NO_VALUE },
  {
    key: 'transit',
    header: 'Transits at midnight',
    align: 'left',
    cell: ({ transitDate }) => transitDate ?? 'never rises',
  },
  { key: 'airmass', header: 'Least airmass', cell: ({ leastAirmass }) => fixed(leastAirmass, 2) },
  { key: 'moon', header: 'Moon then', unit: 'deg', cell: ({ moonSeparationDeg }) => fixed(moonSeparationDeg, 0) },
];

/** Dark hours and best nights of a list, from a site in a semester. @param base path of the list on the service */
export function ObservabilityPanel({ base }: { base: string }) {
  const [draft, setDraft] = useState<SiteDraft>({
    name: '',
    latitudeDeg: '',
    longitudeDeg: '',
    semester: thisSemester(),
    maximumAirmass: '1.5',
  });
  const [search, setSearch] = useState('');
  const { data, error, isFetching } = useQuery({ ...observabilityQuery(base, search), enabled: search !== '' });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setSearch(siteQuery(draft));
  };
  return (
    <div className="stack">
      <form onSubmit={submit} className="row" style={{ alignItems: 'flex-end' }}>
        {SITE_FIELDS.map(({ key, label, info, width, ...field }) => (
          <FormGroup key={key} label={label} labelInfo={info} labelFor={`site-${key}`} style={{ margin: 0, width }}>
            <InputGroup
              id={`site-${key}`}
              required
              value={draft[key]}
              onValueChange={(value) => setDraft({ ...draft, [key]: value })}
              {...field}
            />
          </FormGroup>
        ))}
        <Button type="submit" text="Look" loading={isFetching} />
      </form>
      <ProblemCallout error={error} />
      {data && (
        <>
          <p className="muted small">
            {data.site.name}, {data.from} to {data.to}: hours with the Sun {data.twilightDeg}° down and airmass below{' '}
            {data.maximumAirmass}; nights are named by their evening. The Moon is not counted against them.
          </p>
          <DataTable
            caption="Observability"
            columns={columns}
            rows={data.items}
            rowKey={({ detectionId }) => detectionId}
          />
        </>
      )}
    </div>
  );
}
