import { AnchorButton, Checkbox, FormGroup, HTMLSelect } from '@blueprintjs/core';
import { EDITION_TABLES, type EditionTable } from '@eremite/shared/contracts/edition';
import { useState } from 'react';
import { API_BASE } from '#config/paths.ts';

const TABLE_WORDS: Record<EditionTable, string> = {
  shortlist: 'Shortlist',
  limits: 'Limits per band',
  candidates: 'Candidates',
  neighbours: 'Neighbours',
  doubts: 'Doubts',
  grounds: 'Grounds',
  overrides: 'Overrides',
  reviews: 'Reviews and settled words',
};
const TABLE_FORMATS = [
  { format: 'csv', text: 'CSV' },
  { format: 'votable', text: 'VOTable 1.5' },
  { format: 'votable', text: 'VOTable 1.4', query: '&version=1.4' },
  { format: 'fits', text: 'FITS table' },
  { format: 'mrt', text: 'Machine-readable table' },
  { format: 'latex', text: 'LaTeX table' },
  { format: 'json', text: 'JSON' },
];
const WHOLE = [
  { format: 'dossier', text: 'Dossier (PDF)' },
  { format: 'targets', text: 'Target list' },
  { format: 'methods', text: 'Methods (TeX)' },
  { format: 'bib', text: 'References (BibTeX)' },
];

interface DownloadsProps {
  /** Path of the edition on the service, as the team or as a guest reaches it. */
  base: string;
  hasArchive: boolean;
}

/** Everything the edition can be taken away as: each table in each format, and the whole. */
export function Downloads({ base, hasArchive }: DownloadsProps) {
  const [table, setTable] = useState<EditionTable>('shortlist');
  const [units, setUnits] = useState(false);
  const href = (format: string, query = '') => `${API_BASE}${base}/export/${format}${query}`;
  return (
    <div className="stack">
      <div className="row">
        {WHOLE.map(({ format, text }) => (
          <AnchorButton key={format} text={text} href={href(format)} download />
        ))}
        <AnchorButton
          text="Archive (zip)"
          href={hasArchive ? href('archive') : undefined}
          disabled={!hasArchive}
          download
        />
      </div>
      <div className="row" style={{ alignItems: 'flex-end' }}>
        <FormGroup label="Table" labelFor="export-table" style={{ margin: 0 }}>
          <HTMLSelect
            id="export-table"
            value={table}
            onChange={(event) => setTable(event.target.value as EditionTable)}
            options={EDITION_TABLES.map((value) => ({ value, label: TABLE_WORDS[value] }))}
          />
        </FormGroup>
        {TABLE_FORMATS.map(({ format, text, query = '' }) => (
          <AnchorButton
            key={text}
            text={text}
            href={href(format, `?table=${table}${query}${format === 'csv' && units ? '&units=yes' : ''}`)}
            download
          />
        ))}
        <Checkbox
          checked={units}
          onChange={() => setUnits(!units)}
          label="Units as a second row of CSV"
          style={{ margin: '0 0 6px' }}
        />
      </div>
    </div>
  );
}
