import { createReadStream } from 'node:fs';
import type { EditionFormat, ExportQuery } from '@eremite/shared/contracts/edition';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { EditionHead } from '../../edition/edition-head.ts';
import { methodsBib, methodsTex } from '../../edition/methods/write-methods.ts';
import { FilesService } from '../files/files.service.ts';
import { EditionDossier } from './edition-dossier.ts';
import { EditionExports, type ExportedFile } from './edition-exports.ts';
import type { EditionRow } from './editions.repository.ts';

/** Everything an edition can be taken away as, for the team and for guests alike. */
@Injectable()
export class EditionDownloads {
  constructor(
    private readonly exports: EditionExports,
    private readonly dossier: EditionDossier,
    private readonly files: FilesService,
  ) {}

  async open(edition: EditionRow, format: EditionFormat, query: ExportQuery): Promise<ExportedFile> {
    const head = edition.head as EditionHead;
    const name = `edition-${edition.number}`;
    switch (format) {
      case 'archive':
        return this.#archive(edition, `${name}.zip`);
      case 'dossier':
        return {
          type: 'application/pdf',
          fileName: `${name}-dossier.pdf`,
          pieces: once(await this.dossier.make(edition)),
        };
      case 'methods':
        return text('application/x-tex; charset=utf-8', `${name}-methods.tex`, methodsTex(head, edition.entries));
      case 'bib':
        return text('application/x-bibtex; charset=utf-8', `${name}.bib`, methodsBib(head, edition.entries));
      default:
        return this.exports.table(edition, format, query);
    }
  }

  #archive({ fileKey, state, error }: EditionRow, fileName: string): ExportedFile {
    if (!fileKey) {
      const why = state === 'failed' ? `could not be packed: ${error}` : 'is being packed; a moment';
      throw new AppError('NOT_READY', `The archive ${why}.`);
    }
    return { type: 'application/zip', fileName, pieces: () => createReadStream(this.files.path(fileKey)) };
  }
}

const once = (bytes: Uint8Array): ExportedFile['pieces'] =>
  async function* () {
    yield await Promise.resolve(bytes);
  };

const text = (type: string, fileName: string, content: string): ExportedFile => ({
  type,
  fileName,
  pieces: once(Buffer.from(content)),
});
