import { Worker } from 'node:worker_threads';
import type { Coverage } from '@eremite/shared/drawing/uncovered-cells';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { workerUrl } from '../../common/worker-url.ts';
import type { DossierInput, DossierSource } from '../../edition/dossier/dossier-input.ts';
import type { EditionHead } from '../../edition/edition-head.ts';
import { methodsParagraph } from '../../edition/methods/write-methods.ts';
import { priorityOf } from '../../edition/priority-of.ts';
import { EditionContents } from './edition-contents.ts';
import { type EditionRow, EditionsRepository } from './editions.repository.ts';

/** A page a source: a longer list is read as a table. */
const MOST_SOURCES = 1000;

/** The dossier of an edition, made in a thread of its own. */
@Injectable()
export class EditionDossier {
  constructor(
    private readonly editions: EditionsRepository,
    private readonly contents: EditionContents,
  ) {}

  /** @throws {AppError} TOO_LARGE for a list that no one would page through */
  async make(edition: EditionRow): Promise<Uint8Array> {
    if (edition.entries > MOST_SOURCES) {
      throw new AppError(
        'TOO_LARGE',
        `A dossier has a page a source, ${MOST_SOURCES} at most; this edition has ${edition.entries}.`,
      );
    }
    const head = edition.head as EditionHead;
    const sources: DossierSource[] = [];
    for await (const { line, detail } of this.contents.details(edition)) {
      sources.push({ rank: line.rank, priority: priorityOf(line.item).value, detail, words: line.words });
    }
    return inThread({
      head,
      methods: methodsParagraph(head, edition.entries),
      archiveSha256: edition.sha256,
      coverages: await this.#coverages(head),
      sources,
    });
  }

  async #coverages({ inputs }: EditionHead): Promise<Coverage[]> {
    const tables = await this.editions.tables(inputs.map(({ catalogueId }) => catalogueId));
    return [...tables.values()]
      .filter(({ kind }) => kind !== 'hi' && kind !== 'groups')
      .map(({ id, name, kind, coverage }) => ({ id, name, kind, moc: (coverage as { moc: string | null }).moc }));
  }
}

async function inThread(input: DossierInput): Promise<Uint8Array> {
  const worker = new Worker(workerUrl('dossier'), { workerData: input });
  try {
    return await new Promise<Uint8Array>((resolve, reject) => {
      worker.once('message', resolve);
      worker.once('error', reject);
      worker.once('exit', (code) => reject(new Error(`the dossier thread ended early (code ${code})`)));
    });
  } finally {
    await worker.terminate();
  }
}
