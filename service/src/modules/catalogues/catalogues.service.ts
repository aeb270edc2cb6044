import type { Catalogue } from '@eremite/shared/contracts/catalogue';
import { catalogueRowsQuery } from '@eremite/shared/contracts/catalogue';
import type { SidelinedRow } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { encodeCursor, offsetOf, pageByOffset, pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { bandCountsOf } from '../../intake/band-counts.ts';
import { FactsGatherer } from '../../intake/catalogue-facts.ts';
import type { ResolvedBand } from '../../intake/resolved.ts';
import { type StoredRow, TileStore } from '../../tiles/tile-store.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { type CatalogueRow, CataloguesRepository } from './catalogues.repository.ts';
import { toCatalogue } from './to-catalogue.ts';

type RowsQuery = z.output<typeof catalogueRowsQuery>;

/** Published tables. */
@Injectable()
export class CataloguesService {
  constructor(
    private readonly catalogues: CataloguesRepository,
    private readonly access: AccessService,
    private readonly tiles: TileStore,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Catalogue>> {
    await this.access.survey(user, surveyId, 'read');
    return pageOf((await this.catalogues.list(surveyId)).map(toCatalogue), query);
  }

  async get(user: SignedInUser, id: string): Promise<Catalogue> {
    return toCatalogue(await this.#found(user, id, 'read'));
  }

  /** @throws {AppError} IN_USE while a run stands on it: what a run has read stays as it was */
  async remove(user: SignedInUser, id: string): Promise<void> {
    const { catalogue } = await this.#found(user, id, 'lead');
    await this.catalogues.transaction(async (tx) => {
      await this.catalogues.lock(id, tx);
      const now = await this.catalogues.find(id, tx);
      if (!now) throw new AppError('NOT_FOUND', 'There is no such catalogue.');
      if (now.usedByRuns > 0) {
        const runs = now.usedByRuns === 1 ? 'A run' : `${now.usedByRuns} runs`;
        throw new AppError('IN_USE', `${runs} read "${catalogue.name}"; what a run stands on is kept.`);
      }
      const { supersedes } = catalogue.settings as IntakeSettings;
      // A version between two others gives its place to none: only the last one brings back the one before.
      const last = now.catalogue.state === 'published';
      await this.catalogues.remove(id, last ? (supersedes ?? undefined) : undefined, tx);
      const { surveyId, name, rows, kind, contentHash } = catalogue;
      await this.ledger.append(
        {
          surveyId,
          actor: user,
          action: 'catalogue removed',
          subject: name,
          detail: { catalogueId: id, kind, rows, contentHash },
        },
        tx,
      );
    });
  }

  /** Rows around a place, nearest first, or in the order of the file. */
  async rows(user: SignedInUser, id: string, query: RowsQuery): Promise<List<StoredRow>> {
    const { catalogue } = await this.#found(user, id, 'read');
    const { raDeg, decDeg, radiusArcsec, nearest, row, limit, cursor } = query;
    if (row !== undefined) return pageOf(await this.#single(id, row), query);
    if (nearest !== undefined && raDeg !== undefined && decDeg !== undefined) {
      return pageOf(await this.tiles.readNearest(id, ((raDeg % 360) + 360) % 360, decDeg, nearest), query);
    }
    if ([raDeg, decDeg, radiusArcsec, nearest].some((value) => value !== undefined)) {
      if (raDeg === undefined || decDeg === undefined || radiusArcsec === undefined) {
        throw new AppError('VALIDATION_FAILED', 'A place needs raDeg, decDeg and radiusArcsec (or nearest) together.');
      }
      return pageOf(await this.tiles.readCone(id, ((raDeg % 360) + 360) % 360, decDeg, radiusArcsec), query);
    }
    const first = offsetOf(cursor) + 1;
    const found = await this.tiles.readRowsFrom(id, first, limit + 1);
    const items = found.slice(0, limit);
    // The cursor is the last row number handed out, so that pages stay the same however rows were left out.
    const next = found.length > limit ? encodeCursor([items.at(-1)!.row]) : null;
    return { items, nextCursor: next, total: catalogue.rows };
  }

  async sidelined(user: SignedInUser, id: string, query: ListQuery): Promise<List<SidelinedRow>> {
    const { catalogue } = await this.#found(user, id, 'read');
    const offset = offsetOf(query.cursor);
    const rows = await this.catalogues.sidelined(id, query.limit, offset);
    return pageByOffset(
      rows.map(({ row, line, column, value, reason }) => ({ row, line, column, value, reason })),
      catalogue.sidelined,
      offset,
    );
  }

  /** The sidelined rows as they stand in the file, with place and reason, for a download. */
  async sidelinedTable(user: SignedInUser, id: string) {
    const { catalogue } = await this.#found(user, id, 'read');
    const names = (catalogue.columns as { name: string }[]).map(({ name }) => name);
    const page = (offset: number) => this.catalogues.sidelined(id, 1000, offset);
    async function* rows() {
      for (let offset = 0; ; offset += 1000) {
        const batch = await page(offset);
        for (const { row, line, column, reason, cells } of batch) {
          const own = JSON.parse(cells) as string[];
          // A row that could not be split into cells stands whole in the first column.
          yield [...names.map((_, i) => own[i] ?? ''), row, line, column ?? '', reason];
        }
        if (batch.length < 1000) return;
      }
    }
    return { catalogue, names, rows: rows() };
  }

  /** Counts of magnitudes by band, for a histogram beside the stated depth. */
  async magnitudes(user: SignedInUser, id: string) {
    const { catalogue } = await this.#found(user, id, 'read');
    const gatherer = new FactsGatherer();
    gatherer.add(await this.tiles.readRoles(id, 'sky'));
    return { bands: bandCountsOf(catalogue.bands as ResolvedBand[], gatherer.facts()) };
  }

  /** Name of a row, its number where the table names none; undefined if there is no such row. */
  async rowName(catalogueId: string, row: number): Promise<string | undefined> {
    const found = await this.tiles.readName(catalogueId, row);
    return found === undefined ? undefined : found || String(row);
  }

  async #single(id: string, row: number): Promise<StoredRow[]> {
    const found = await this.tiles.readRow(id, row);
    return found ? [found] : [];
  }

  async #found(
    user: SignedInUser,
    id: string,
    need: 'read' | 'lead',
  ): Promise<{ catalogue: CatalogueRow; usedByRuns: number }> {
    const found = await this.catalogues.find(id);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such catalogue.');
    await this.access.survey(user, found.catalogue.surveyId, need);
    return found;
  }
}
