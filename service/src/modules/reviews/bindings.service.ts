import type { AnswerBindingRequest, Binding } from '@eremite/shared/contracts/binding';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable, type OnModuleInit } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { SurveyHooks } from '../../common/survey-hooks.ts';
import type { Database } from '../../database/database.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { type Bound } from './bind-source.ts';
import { type BindingRow, BindingsRepository } from './bindings.repository.ts';
import { boundDetections } from './bound-detections.ts';
import { BoundObjects } from './bound-objects.ts';

/** The one who does what nobody asked for by hand. */
const NOBODY = { id: null, name: 'Eremite' };

/**
 * Finds the sources that people's words were given on in the new version of a table, by name and position; words whose
 * source is certain go along, the others are asked.
 */
@Injectable()
export class BindingsService implements OnModuleInit {
  constructor(
    private readonly bindings: BindingsRepository,
    private readonly objects: BoundObjects,
    private readonly tiles: TileStore,
    private readonly access: AccessService,
    private readonly hooks: SurveyHooks,
    private readonly ledger: LedgerService,
  ) {}

  onModuleInit(): void {
    this.hooks.onPublished((surveyId) => this.bind(surveyId));
    // Once more, for what a killed process left undone.
    this.hooks.onRunStarting((surveyId) => this.bind(surveyId));
  }

  /** Looks for all sources of all superseded tables that have not been looked for. Does nothing the second time. */
  async bind(surveyId: string): Promise<void> {
    for (const table of await this.bindings.supersedings(surveyId)) {
      // Read before the transaction, for the tiles have no part in it.
      const places = await this.#places(table);
      await this.bindings.transaction(async (tx) => {
        await this.bindings.lock(surveyId, tx);
        const done = table.kind === 'hi' ? await this.#detections(surveyId, table, tx) : { sure: 0, open: 0 };
        const objects = await this.#objects(surveyId, table, places, tx);
        const [sure, open] = [done.sure + objects.sure, done.open + objects.open];
        if (sure + open === 0) return;
        const detail = { catalogueId: table.id, supersedes: table.supersedes, sure, open };
        const subject = `${table.name}: ${sure} found, ${open} asked`;
        await this.ledger.append(
          { surveyId, actor: NOBODY, action: 'bound decisions to a new version', subject, detail },
          tx,
        );
      });
    }
  }

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Binding>> {
    await this.access.survey(user, surveyId, 'read');
    const rows = await this.bindings.open(surveyId);
    return pageOf(
      rows.map(({ binding, catalogueName, action, by }) => ({
        ...toContract(binding, catalogueName),
        words: action ? [`${action}ed as counterpart by ${by ?? 'someone'}`] : [],
      })),
      query,
    );
  }

  /** Says which row is meant, or that none is. */
  async answer(user: SignedInUser, id: string, { row, note }: AnswerBindingRequest): Promise<void> {
    const binding = await this.bindings.find(id);
    if (!binding) throw new AppError('NOT_FOUND', 'There is no such question.');
    await this.access.survey(user, binding.surveyId, 'review');
    const name = row === null ? undefined : await this.tiles.readName(binding.catalogueId, row);
    if (row !== null && name === undefined) throw new AppError('NOT_FOUND', `The table has no usable row ${row}.`);
    await this.bindings.transaction(async (tx) => {
      const values = { state: row === null ? 'dropped' : 'answered', row, note, answeredBy: user.id };
      if (!(await this.bindings.answer(id, values, tx)))
        throw new AppError('CONFLICT', 'Someone else answered this question already.');
      if (row !== null) await this.#carry({ ...binding, row }, name || String(row), tx);
      const action = row === null ? 'left a decision with the earlier version' : 'bound a decision to a new version';
      const detail = { detectionId: binding.detectionId, bindingId: id, catalogueId: binding.catalogueId, row };
      await this.ledger.append(
        { surveyId: binding.surveyId, actor: user, action, subject: binding.name, note, detail },
        tx,
      );
    });
  }

  async #detections(surveyId: string, table: { id: string; supersedes: string }, tx: Database) {
    const wanted = await this.bindings.detectionsWithWords(table.supersedes, table.id, tx);
    if (wanted.length === 0) return { sure: 0, open: 0 };
    const before = await this.bindings.detectionsOf(table.supersedes, tx);
    const after = await this.bindings.detectionsOf(table.id, tx);
    const bound = boundDetections(
      wanted.map(({ detection }) => detection),
      before,
      after,
    );
    const count = { sure: 0, open: 0 };
    for (const { source, ...found } of bound) {
      const about = { surveyId, catalogueId: table.id, kind: 'detection', detectionId: source.id, name: source.name };
      count[await this.#keep(about, found, tx)] += 1;
    }
    return count;
  }

  /** Where the objects of overrides stand in the new table, by override. */
  async #places(table: { id: string; supersedes: string }): Promise<Map<string, Bound>> {
    const places = new Map<string, Bound>();
    for (const { override } of await this.bindings.overridesOn(table.supersedes, table.id)) {
      places.set(override.id, await this.objects.find(override, table.id));
    }
    return places;
  }

  async #objects(
    surveyId: string,
    table: { id: string; supersedes: string },
    places: ReadonlyMap<string, Bound>,
    tx: Database,
  ) {
    const count = { sure: 0, open: 0 };
    for (const { override } of await this.bindings.overridesOn(table.supersedes, table.id, tx)) {
      const found = places.get(override.id);
      // Made since: the next look finds it.
      if (!found) continue;
      const { detectionId, id: overrideId, objectName: name } = override;
      const about = { surveyId, catalogueId: table.id, kind: 'object', detectionId, overrideId, name };
      count[await this.#keep(about, found, tx)] += 1;
    }
    return count;
  }

  async #keep(
    about: Pick<BindingRow, 'surveyId' | 'catalogueId' | 'kind' | 'detectionId' | 'name'> & { overrideId?: string },
    { row, candidates }: Bound,
    tx: Database,
  ): Promise<'sure' | 'open'> {
    const state = row === null ? 'open' : 'sure';
    const id = await this.bindings.insert({ ...about, state, row, candidates }, tx);
    if (row !== null) {
      const name = candidates.find((candidate) => candidate.row === row)?.name;
      await this.#carry((await this.bindings.find(id, tx))!, name || String(row), tx);
    }
    return state;
  }

  async #carry(binding: BindingRow, objectName: string, tx: Database): Promise<void> {
    const { catalogueId, detectionId, overrideId, row } = binding;
    if (binding.kind === 'detection') {
      const successor = await this.bindings.detectionAt(catalogueId, row!, tx);
      if (!successor) throw new AppError('NOT_FOUND', `The table has no detection in row ${row}.`);
      await this.bindings.setSuccessor(binding.id, successor.id, tx);
      await this.bindings.carryDetection(detectionId, successor.id, tx);
      return;
    }
    const override = await this.bindings.override(overrideId!, tx);
    if (override) await this.bindings.carryOverride(override, { catalogueId, row: row!, objectName }, tx);
  }
}

function toContract(row: BindingRow, catalogueName: string): Omit<Binding, 'words'> {
  const { id, kind, detectionId, name, catalogueId, state, candidates } = row;
  return {
    id,
    kind: kind as Binding['kind'],
    detectionId,
    name,
    catalogueId,
    catalogueName,
    state: state as Binding['state'],
    candidates: candidates as Binding['candidates'],
    row: row.row,
  };
}
