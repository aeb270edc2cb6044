import type { EditionFormat, ExportQuery } from '@eremite/shared/contracts/edition';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import type { EditionHead } from '../../edition/edition-head.ts';
import { latexLayout } from '../../edition/latex-layout.ts';
import { priorityOf } from '../../edition/priority-of.ts';
import { type Target, writeTargets } from '../../edition/targets.ts';
import { writeLatex } from '../../tables/writers/latex.ts';
import { FORMAT_FACTS, writeTable } from '../../tables/writers/write-table.ts';
import { EditionContents } from './edition-contents.ts';
import type { EditionRow } from './editions.repository.ts';

/** A file to be handed out; its bytes are made as they are asked for. */
export interface ExportedFile {
  type: string;
  fileName: string;
  pieces(): AsyncIterable<Uint8Array>;
}

export type TableLikeFormat = Exclude<EditionFormat, 'dossier' | 'bib' | 'methods' | 'archive'>;

/** Tables of an edition in every format: the same columns, the same numbers. */
@Injectable()
export class EditionExports {
  constructor(private readonly contents: EditionContents) {}

  table(edition: EditionRow, format: TableLikeFormat, { table, units, version }: ExportQuery): ExportedFile {
    const head = edition.head as EditionHead;
    const name = `edition-${edition.number}-${format === 'targets' ? 'targets' : table}`;
    if (format === 'targets') {
      const description = `Targets of edition ${edition.number} of ${head.survey.name}, frozen ${head.frozenAt}`;
      return {
        type: 'text/plain; charset=utf-8',
        fileName: `${name}.txt`,
        pieces: () => writeTargets(this.#targets(edition), description),
      };
    }
    const answer = () => this.contents.table(edition, table);
    if (format === 'latex') {
      return {
        type: 'application/x-tex; charset=utf-8',
        fileName: `${name}.tex`,
        pieces: () => {
          const { columns, rows, description } = answer();
          return writeLatex(columns, rows, latexLayout(table, edition.number, description));
        },
      };
    }
    const { type, ending } = FORMAT_FACTS[format];
    const authors = `${head.survey.team}; edition ${edition.number} frozen by ${head.frozenBy}, ${head.frozenAt.slice(0, 10)}`;
    return {
      type,
      // The description of a machine-readable table and the target list are both .txt.
      fileName: format === 'mrt' ? `${name}-mrt.${ending}` : `${name}.${ending}`,
      pieces: () => {
        const { columns, rows, description } = answer();
        const whole = {
          name,
          title: description,
          authors,
          description: `${description}. ${SCREENING_CAUTION}`,
          columns,
          rows,
        };
        return writeTable(format, whole, { unitsRow: units === 'yes', version });
      },
    };
  }

  async *#targets(edition: EditionRow): AsyncIterable<Target> {
    for await (const { rank, item, words, detail } of this.contents.lines(edition)) {
      const { reason, nullResult } = words;
      const { limits, searchRadiusArcsec } = detail;
      yield { rank, item, limits, searchRadiusArcsec, priority: priorityOf(item).value, reason, nullResult };
    }
  }
}
