import { createReadStream } from 'node:fs';
import type { Readable } from 'node:stream';
import { EDITION_TABLES } from '@eremite/shared/contracts/edition';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { FORMAT_VERSION, type InputFile, MANIFEST, RESULTS, type ResultLine } from '../../edition/archive/manifest.ts';
import { sha256 } from '../../edition/archive/sha256.ts';
import { type ArchiveEntry, writeArchive } from '../../edition/archive/write-archive.ts';
import type { EditionHead } from '../../edition/edition-head.ts';
import { methodsBib, methodsTex, methodsText } from '../../edition/methods/write-methods.ts';
import { utf8Pieces } from '../../tables/writers/utf8-pieces.ts';
import { FilesService } from '../files/files.service.ts';
import { type Companion, companionsOf } from '../intakes/companions.ts';
import { EditionExports } from './edition-exports.ts';
import { type EditionRow, EditionsRepository } from './editions.repository.ts';

type StoredInput = EditionHead['inputs'][number] & { files: (InputFile & { key: string })[] };

/** Lays the archive of an edition out: inputs, results of the whole run, the list in every format, ledger, methods. */
@Injectable()
export class EditionArchive {
  constructor(
    private readonly editions: EditionsRepository,
    private readonly exports: EditionExports,
    private readonly files: FilesService,
  ) {}

  async open(edition: EditionRow, onProgress: (fraction: number, message: string) => void): Promise<Readable> {
    const head = edition.head as EditionHead;
    const inputs = await this.#inputs(head);
    const entries: ArchiveEntry[] = [
      text('README.txt', readMe(head, edition.entries)),
      ...inputs.flatMap(({ files }) =>
        files.map(({ path, key }) => ({ path, open: () => createReadStream(this.files.path(key)) })),
      ),
      { path: RESULTS, open: () => utf8Pieces(this.#results(edition.runId)) },
      { path: 'ledger.jsonl', open: () => utf8Pieces(this.#ledger(edition)) },
      ...EDITION_TABLES.flatMap((table) => this.#table(edition, table, ['csv', 'votable'])),
      ...this.#table(edition, 'shortlist', ['fits', 'mrt', 'latex', 'targets']),
      text('methods/methods.txt', methodsText(head, edition.entries)),
      text('methods/methods.tex', methodsTex(head, edition.entries)),
      text('methods/references.bib', methodsBib(head, edition.entries)),
    ];
    let done = 0;
    return writeArchive(
      {
        format: 'eremite edition',
        formatVersion: FORMAT_VERSION,
        ...head,
        inputs: inputs.map(({ files, ...input }) => ({
          ...input,
          files: files.map(({ role, path }) => ({ role, path })),
        })),
      },
      entries,
      edition.createdAt,
      ({ path }) => onProgress(++done / (entries.length + 1), `packed ${path}`),
    );
  }

  async #inputs({ inputs }: EditionHead): Promise<StoredInput[]> {
    const tables = await this.editions.tables(inputs.map(({ catalogueId }) => catalogueId));
    return inputs.map((input, i) => {
      const { fileKey, fileName, companions } = tables.get(input.catalogueId)!;
      const number = String(i + 1).padStart(2, '0');
      const stored = (role: InputFile['role'], name: string, key: string, part = '') => {
        return { role, path: `inputs/${number}${part}-${safeName(name)}`, key };
      };
      const others = companionsOf({ companions }).map((file: Companion, n) =>
        stored(file.role, file.fileName, file.key, `-${n + 1}`),
      );
      return { ...input, files: [stored('table', fileName, fileKey), ...others] };
    });
  }

  async *#results(runId: string): AsyncIterable<string> {
    for (let after = -1; ;) {
      const rows = await this.editions.results(runId, after);
      if (rows.length === 0) return;
      for (const { catalogueId, row, item, detail, candidates, neighbours } of rows) {
        const line: ResultLine = {
          catalogueId,
          row,
          item: withoutPeople(item as Record<string, unknown>),
          detail: detail as Record<string, unknown>,
          candidatesSha256: sha256(candidates),
          neighboursSha256: sha256(neighbours),
        };
        yield `${JSON.stringify(line)}\n`;
      }
      after = rows.at(-1)!.position;
    }
  }

  async *#ledger({ surveyId, head }: EditionRow): AsyncIterable<string> {
    const { number } = (head as EditionHead).ledgerHead;
    for (let after = 0; after < number;) {
      const rows = await this.editions.ledgerLines(surveyId, after, number);
      if (rows.length === 0) return;
      for (const { id: _, ...line } of rows) yield `${JSON.stringify(line)}\n`;
      after = rows.at(-1)!.number;
    }
  }

  #table(
    edition: EditionRow,
    table: (typeof EDITION_TABLES)[number],
    formats: readonly ('csv' | 'votable' | 'fits' | 'mrt' | 'latex' | 'targets')[],
  ): ArchiveEntry[] {
    return formats.map((format) => {
      const file = this.exports.table(edition, format, { table, units: 'no', version: '1.5' });
      return { path: `tables/${file.fileName}`, open: () => file.pieces() };
    });
  }
}

const text = (path: string, content: string): ArchiveEntry => ({
  path,
  open: async function* () {
    yield await Promise.resolve(Buffer.from(content));
  },
});

/** A name that unpacks everywhere; the number before it keeps it its own. */
const safeName = (name: string): string => name.replace(/[^\w.-]+/g, '_').slice(-120) || 'table';

/** The item as the engine made it: what people said, and the identity in this database, are no part of a run. */
function withoutPeople(item: Record<string, unknown>): Record<string, unknown> {
  const { detectionId: _, settled: __, reviews: ___, overrides: ____, ...rest } = item;
  return rest;
}

function readMe({ number, survey, run, criteria, frozenAt, frozenBy, note }: EditionHead, entries: number): string {
  return `Edition ${number} of ${survey.name}
${'='.repeat(`Edition ${number} of ${survey.name}`.length)}

${note}

Frozen ${frozenAt} by ${frozenBy}, ${survey.team}: ${entries} of the ${run.detections} detections of run ${run.number}
with criteria ${criteria.number}.

${SCREENING_CAUTION}

${MANIFEST}          what the edition is: survey, criteria, run, inputs, decisions taken up, ledger head,
                      versions, and the sha256 of every other file
inputs/               the tables as they were uploaded
${RESULTS}   what the run found of every detection, a JSON line each, in input order
tables/               the list and its evidence in several formats
ledger.jsonl          the history of the survey up to the edition; each line's hash covers the line before
methods/              a methods paragraph, its TeX source, the works it cites, every parameter

npm run replay -- <this file>   repeats the run from inputs/ and says whether every number comes out again.
`;
}
