import { createHash, randomUUID } from 'node:crypto';
import type { IntakeColumn, PublishResult } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { SurveyHooks } from '../../common/survey-hooks.ts';
import { BulkStore, type CopyPiece } from '../../database/bulk.ts';
import type { Published, SidelinedCells } from '../../intake/publish.ts';
import type { JobContext } from '../../jobs/job-handler.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { FilesService } from '../files/files.service.ts';
import { canonicalJson } from '../ledger/ledger-hash.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { DETECTION_COLUMNS, detectionRows } from './detection-rows.ts';
import { companionsOf, storedFiles } from './companions.ts';
import { Handover } from './handover.ts';
import { IntakeWorker } from './intake-worker.ts';
import { type IntakeRow, IntakesRepository } from './intakes.repository.ts';

export const PUBLISH = 'publish';
interface Payload {
  intakeId: string;
  userId: string;
  userName: string;
}
/** Share of the work that is reading and storing; the rest is making it seen. */
const READING = 0.95;

/**
 * Publishes an intake as a job: everything is staged under a catalogue nobody sees, then one transaction shows it. Whatever
 * happens before leaves the intake as it was.
 */
@Injectable()
export class PublishingService implements OnModuleInit {
  constructor(
    private readonly intakes: IntakesRepository,
    private readonly files: FilesService,
    private readonly worker: IntakeWorker,
    private readonly tiles: TileStore,
    @Inject(BulkStore) private readonly bulk: BulkStore,
    private readonly ledger: LedgerService,
    private readonly jobs: JobsService,
    private readonly hooks: SurveyHooks,
  ) {}

  onModuleInit(): void {
    this.jobs.register<Payload, PublishResult>({
      kind: PUBLISH,
      run: (payload, context) => this.run(payload, context),
      recover: ({ intakeId }) => this.intakes.sweep(intakeId),
      ended: async ({ intakeId }) => {
        await this.intakes.sweep(intakeId);
        await this.intakes.change(intakeId, 'publishing', { state: 'staged' });
      },
    });
  }

  private async run(payload: Payload, context: JobContext): Promise<PublishResult> {
    const intake = await this.intakes.find(payload.intakeId);
    if (!intake) throw new AppError('NOT_FOUND', 'The upload is gone.');
    // The process may have died between showing the catalogue and saying so.
    if (intake.state === 'published' && intake.catalogueId) {
      const { catalogueId } = intake;
      return { catalogueId, ...(await this.intakes.publishedCounts(catalogueId)) };
    }
    await this.intakes.sweep(intake.id);
    const catalogueId = await this.stage(intake, payload);
    try {
      const published = await this.store(intake, catalogueId, context);
      if (published.resolved.kind === 'hi') await this.storeDetections(intake.surveyId, catalogueId);
      context.signal.throwIfAborted();
      await this.show(intake, catalogueId, published, payload);
      await this.hooks.published(intake.surveyId, catalogueId);
      return { catalogueId, rows: published.check.usable, sidelined: published.check.sidelined };
    } catch (error) {
      await this.intakes.sweep(intake.id);
      throw error;
    }
  }

  private stage(intake: IntakeRow, { userId }: Payload): Promise<string> {
    const { surveyId, id: intakeId, fileName, sha256, settings } = intake;
    return this.intakes.stageCatalogue({
      surveyId,
      intakeId,
      name: fileName,
      kind: (settings as IntakeSettings).kind ?? 'optical',
      state: 'publishing',
      fileName,
      sha256,
      contentHash: '',
      settings: settings as object,
      columns: intake.columns as IntakeColumn[],
      bands: [],
      coverage: {},
      createdBy: userId,
    });
  }

  /** Reads the file in its thread and writes as it comes; the thread waits whenever the database is behind. */
  private async store(intake: IntakeRow, catalogueId: string, { signal, progress }: JobContext): Promise<Published> {
    const pieces = new Handover<CopyPiece>();
    const writing = this.tiles.write(pieces);
    const file = {
      ...storedFiles(this.files, intake),
      settings: intake.settings as IntakeSettings,
      catalogueId,
    };
    try {
      const published = await this.worker.publish(file, {
        signal,
        progress: (fraction, rows) => progress(fraction * READING, `${rows.toLocaleString('en')} rows read`),
        tiles: (piece) => Promise.race([pieces.put(piece), writing.then(() => undefined)]),
        sidelined: (rows) => this.storeSidelined(catalogueId, rows),
      });
      pieces.end();
      await writing;
      return published;
    } catch (error) {
      pieces.end();
      await writing.catch(() => undefined);
      throw error;
    }
  }

  private async storeSidelined(catalogueId: string, rows: SidelinedCells[]): Promise<void> {
    const columns = [
      { name: 'catalogue_id', type: 'uuid' },
      { name: 'row', type: 'int4' },
      { name: 'line', type: 'int4' },
      { name: 'column', type: 'text' },
      { name: 'value', type: 'text' },
      { name: 'reason', type: 'text' },
      { name: 'cells', type: 'text' },
    ] as const;
    const batch = rows.map(({ row, line, column, value, reason, cells }) => [
      catalogueId,
      row,
      line,
      column,
      value,
      reason,
      JSON.stringify(cells),
    ]);
    await this.bulk.copyInto('sidelined_rows', columns, [batch]);
  }

  /** Detections are rows of their own, for reviews and overrides point at them. */
  private async storeDetections(surveyId: string, catalogueId: string): Promise<void> {
    const roles = await this.tiles.readRoles(catalogueId, 'file');
    await this.bulk.copyInto('detections', DETECTION_COLUMNS, detectionRows(roles, surveyId, catalogueId, randomUUID));
  }

  private async show(
    intake: IntakeRow,
    catalogueId: string,
    published: Published,
    { userId, userName }: Payload,
  ): Promise<void> {
    const { resolved, check, facts, assumed, coverage, parts } = published;
    const { surveyId, sha256 } = intake;
    // A table alone has the hash it always had.
    const others = companionsOf(intake).map((file) => `${file.sha256}\n`);
    const contentHash = createHash('sha256')
      .update(`${sha256}\n${others.join('')}${canonicalJson(resolved)}`)
      .digest('hex');
    const hashes = [sha256, ...companionsOf(intake).flatMap((file) => (file.role === 'part' ? [file.sha256] : []))];
    const name = resolved.name || intake.fileName;
    const values = {
      name,
      kind: resolved.kind,
      contentHash,
      rows: check.usable,
      sidelined: check.sidelined,
      withVelocity: facts.withVelocity,
      settings: resolved,
      bands: resolved.bands,
      assumed,
      parts: parts.map((part, i) => ({ ...part, sha256: hashes[i]! })),
      coverage,
      reference: resolved.reference,
      publishedAt: new Date(),
    };
    await this.intakes.transaction(async (tx) => {
      if (!(await this.intakes.showCatalogue(catalogueId, values, tx)))
        throw new AppError('CONFLICT', 'The staged table is gone.');
      const { supersedes } = resolved;
      if (supersedes && !(await this.intakes.supersede(supersedes, surveyId, resolved.kind, tx))) {
        throw new AppError('CONFLICT', 'The catalogue it is to supersede is no longer in use.');
      }
      await this.intakes.change(intake.id, 'publishing', { state: 'published', catalogueId }, tx);
      await this.ledger.append(
        {
          surveyId,
          actor: { id: userId, name: userName },
          action: 'catalogue published',
          subject: name,
          detail: {
            catalogueId,
            kind: resolved.kind,
            rows: check.usable,
            sidelined: check.sidelined,
            leftOut: check.leftOut,
            sha256,
            ...(parts.length > 0 ? { parts: parts.length } : {}),
            contentHash,
            assumed,
            ...(supersedes ? { supersedes } : {}),
          },
        },
        tx,
      );
    });
  }
}
