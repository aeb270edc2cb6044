import { Readable } from 'node:stream';
import { Injectable } from '@nestjs/common';
import type { JobContext, JobHandler } from '../../jobs/job-handler.ts';
import { FilesService } from '../files/files.service.ts';
import { EditionArchive } from './edition-archive.ts';
import { EditionsRepository } from './editions.repository.ts';

export const PACK_EDITION = 'edition';

/**
 * Packs the archive of an edition. Everything it is made of was frozen with the edition or never changes, so an
 * interrupted job simply starts again.
 */
@Injectable()
export class PackEditionJob implements JobHandler<{ editionId: string }, { editionId: string }> {
  readonly kind = PACK_EDITION;

  constructor(
    private readonly editions: EditionsRepository,
    private readonly archive: EditionArchive,
    private readonly files: FilesService,
  ) {}

  async run({ editionId }: { editionId: string }, { signal, progress }: JobContext): Promise<{ editionId: string }> {
    const edition = await this.editions.find(editionId);
    if (!edition || edition.state !== 'packing') return { editionId };
    const stream = await this.archive.open(edition, progress);
    const stop = () => stream.destroy(signal.reason as Error);
    signal.addEventListener('abort', stop, { once: true });
    // Its size is that of the inputs, which were let in already.
    const saved = await this.files.save(Readable.from(stream), Number.MAX_SAFE_INTEGER).finally(() => {
      signal.removeEventListener('abort', stop);
    });
    const { key: fileKey, bytes, sha256 } = saved;
    if (!(await this.editions.finish(editionId, { state: 'frozen', fileKey, bytes, sha256 }))) {
      await this.files.remove(fileKey);
    }
    return { editionId };
  }

  async recover(): Promise<void> {
    // Nothing is left behind: a half-written file is swept at the start.
  }

  async ended({ editionId }: { editionId: string }, { error }: { error: string }): Promise<void> {
    await this.editions.finish(editionId, { state: 'failed', error });
  }
}
