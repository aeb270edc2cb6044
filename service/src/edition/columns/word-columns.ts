import type { EditionReview, EditionOverride } from '@eremite/shared/contracts/edition';
import type { EvidenceLine } from './evidence-columns.ts';
import { type TableColumn, text, whole } from './table-column.ts';

type Column<Entry> = TableColumn<EvidenceLine<Entry>>;

/** Words of people on counterparts, those taken back among them. */
export const OVERRIDE_COLUMNS: Column<EditionOverride>[] = [
  text('detection', 'Name in the HI list', ({ detection }) => detection, { ucd: 'meta.id.parent' }),
  text('catalogue', 'Table of the row', ({ entry }) => entry.catalogueName, { ucd: 'meta.id;meta.dataset' }),
  text('row', 'Name of the row', ({ entry }) => entry.objectName, { ucd: 'meta.id' }),
  whole('row_number', 'Number of the row in its file', ({ entry }) => entry.rowId, { ucd: 'meta.record' }),
  text('action', 'accept or reject as the counterpart', ({ entry }) => entry.action),
  text('note', 'Why', ({ entry }) => entry.note, { ucd: 'meta.note' }),
  text('by', 'Who', ({ entry }) => entry.by, { ucd: 'meta.id.PI' }),
  text('at', 'When, UTC', ({ entry }) => entry.at, { ucd: 'time.creation' }),
  text('withdrawn_at', 'When it was taken back, UTC', ({ entry }) => entry.withdrawnAt),
  text('withdrawn_note', 'Why it was taken back', ({ entry }) => entry.withdrawnNote || null, { ucd: 'meta.note' }),
];

/** What reviewers and the lead said, settled words first. */
export const REVIEW_COLUMNS: Column<EditionReview>[] = [
  text('detection', 'Name in the HI list', ({ detection }) => detection, { ucd: 'meta.id.parent' }),
  text('said_as', 'review, or settled by the lead', ({ entry }) => entry.as),
  whole('run', 'Number of the run it is on', ({ entry }) => entry.runNumber),
  text('outcome', 'verdict, or what was said in place of one', ({ entry }) => entry.outcome),
  text('starlight', 'Starlight verdict given', ({ entry }) => entry.starlight, { ucd: 'meta.code.class' }),
  text('surroundings', 'Surroundings verdict given', ({ entry }) => entry.surroundings, { ucd: 'meta.code.class' }),
  text('note', 'Why', ({ entry }) => entry.note || null, { ucd: 'meta.note' }),
  text('by', 'Who', ({ entry }) => entry.by, { ucd: 'meta.id.PI' }),
  text('at', 'When, UTC', ({ entry }) => entry.at, { ucd: 'time.creation' }),
];
