import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { FilesService } from '../files/files.service.ts';
import type { Inspection } from '../../intake/inspect.ts';
import { type Companion, companionsOf, storedFiles } from './companions.ts';
import { IntakeWorker } from './intake-worker.ts';
import { type IntakeRow, IntakesRepository } from './intakes.repository.ts';
import { PUBLISH } from './publishing.service.ts';
import { headerHash, inspectedValues, storedCheck, toIntake } from './to-intake.ts';
import { MOST_PARTS, type UploadedTable } from './upload.interceptor.ts';

/** Uploaded tables on their way to becoming catalogues. */
@Injectable()
export class IntakesService {
  constructor(
    private readonly intakes: IntakesRepository,
    private readonly access: AccessService,
    private readonly files: FilesService,
    private readonly worker: IntakeWorker,
    private readonly jobs: JobsService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Intake>> {
    await this.access.survey(user, surveyId, 'read');
    const offset = offsetOf(query.cursor);
    const [rows, total] = await Promise.all([
      this.intakes.page(surveyId, query.limit, offset),
      this.intakes.count(surveyId),
    ]);
    return pageByOffset(rows.map(toIntake), total, offset);
  }

  async get(user: SignedInUser, id: string): Promise<Intake> {
    return toIntake(await this.#row(user, id, 'read'));
  }

  /**
   * Takes a file in: any readable table, whatever the settings say of it. Without settings those of an earlier table with
   * the same columns are taken over.
   *
   * @throws {AppError} TABLE_UNREADABLE; the file is not kept then
   */
  async create(
    user: SignedInUser,
    surveyId: string,
    upload: Omit<UploadedTable, 'companions'> & { companions?: UploadedTable['companions'] },
    given: IntakeSettings | undefined,
  ): Promise<Intake> {
    const { key: fileKey, fileName, bytes, sha256, companions = [] } = upload;
    const file = { fileKey, fileName, companions };
    const warnings: string[] = [];
    let settings = given ?? {};
    let inspection = await this.#inspect(surveyId, file, settings);
    const hash = headerHash(inspection.columns);
    const earlier = given ? undefined : await this.intakes.sameHeader(surveyId, hash);
    if (earlier) {
      settings = remembered(earlier);
      inspection = await this.#inspect(surveyId, file, settings);
      warnings.push(`The settings are those of "${earlier.fileName}", which has the same columns; look them over.`);
    }
    const twin = await this.intakes.sameContent(surveyId, sha256);
    if (twin) warnings.push(`The survey already has a table with exactly the same content: "${twin.fileName}".`);
    const values = inspectedValues(inspection);
    const row = await this.intakes.insert({
      surveyId,
      createdBy: user.id,
      fileName,
      fileKey,
      bytes,
      sha256,
      companions,
      settings: await this.#complete(surveyId, settings),
      warnings,
      headerHash: hash,
      ...values,
    });
    return toIntake(row);
  }

  /**
   * Reads the table again under other settings.
   *
   * @throws {AppError} SETTINGS_INCOMPLETE where they name what the table does not have; the old ones stay then
   */
  async update(user: SignedInUser, id: string, settings: IntakeSettings): Promise<Intake> {
    const row = await this.#row(user, id, 'lead');
    assertStaged(row);
    const inspection = await this.#inspect(row.surveyId, row, settings);
    const wrong = inspection.faults.filter(({ pointer }) => !isOpenPosition(pointer, settings));
    if (wrong.length) throw new AppError('SETTINGS_INCOMPLETE', wrong.map(({ detail }) => detail).join(' '), wrong);
    const complete = await this.#complete(row.surveyId, settings);
    const values = { settings: complete, headerHash: headerHash(inspection.columns), ...inspectedValues(inspection) };
    const changed = await this.intakes.change(id, 'staged', values);
    if (!changed) throw new AppError('NOT_READY', 'The table is being published meanwhile.');
    return toIntake(changed);
  }

  /**
   * Adds files to a table as further parts of the same catalogue.
   *
   * @throws {AppError} TABLE_UNREADABLE where one has other columns; nothing is added then
   */
  async addParts(user: SignedInUser, id: string, upload: UploadedTable): Promise<Intake> {
    const row = await this.#row(user, id, 'lead');
    assertStaged(row);
    const { companions, ...first } = upload;
    const readMe = companions.find(({ role }) => role === 'readMe');
    if (readMe) throw new AppError('VALIDATION_FAILED', 'A ReadMe comes with its data file, not with a part.');
    const all = [...companionsOf(row), { role: 'part' as const, ...first }, ...companions];
    const parts = all.filter(({ role }) => role === 'part').length + 1;
    if (parts > MOST_PARTS)
      throw new AppError('VALIDATION_FAILED', `A catalogue may have at most ${MOST_PARTS} parts, not ${parts}.`);
    return this.#setCompanions(row, all);
  }

  /** Takes a part out again; parts are numbered from 1, the file they were added to is 0 and stays. */
  async removePart(user: SignedInUser, id: string, part: number): Promise<Intake> {
    const row = await this.#row(user, id, 'lead');
    assertStaged(row);
    const parts = companionsOf(row).filter(({ role }) => role === 'part');
    const gone = parts[part - 1];
    if (!gone) throw new AppError('NOT_FOUND', `There is no part ${part}.`);
    const changed = await this.#setCompanions(
      row,
      companionsOf(row).filter((one) => one !== gone),
    );
    await this.files.remove(gone.key);
    return changed;
  }

  async #setCompanions(row: IntakeRow, companions: Companion[]): Promise<Intake> {
    const { filled } = storedCheck(row);
    const inspection = await this.#inspect(row.surveyId, { ...row, companions }, filled);
    const values = { companions, settings: await this.#complete(row.surveyId, filled), ...inspectedValues(inspection) };
    const changed = await this.intakes.change(row.id, 'staged', values);
    if (!changed) throw new AppError('NOT_READY', 'The table is being published meanwhile.');
    return toIntake(changed);
  }

  /** Puts publishing on the queue. */
  async publish(user: SignedInUser, id: string): Promise<{ jobId: string }> {
    const row = await this.#row(user, id, 'lead');
    assertStaged(row);
    assertReady(row);
    await this.#assertSupersedable(row);
    const jobId = await this.intakes.transaction(async (tx) => {
      if (!(await this.intakes.change(id, 'staged', { state: 'publishing' }, tx)))
        assertStaged({ state: 'publishing' });
      return this.jobs.add(
        PUBLISH,
        { intakeId: id, userId: user.id, userName: user.name },
        { surveyId: row.surveyId, userId: user.id },
        tx,
      );
    });
    await this.jobs.release(jobId);
    return { jobId };
  }

  /** Forgets an upload that is not published. */
  async discard(user: SignedInUser, id: string): Promise<void> {
    const row = await this.#row(user, id, 'lead');
    assertStaged(row);
    if (!(await this.intakes.change(id, 'staged', { state: 'discarded' }))) assertStaged({ state: 'publishing' });
    const keys = [row.fileKey, ...companionsOf(row).map(({ key }) => key)];
    await Promise.all(keys.map((key) => this.files.remove(key)));
  }

  /** @throws {AppError} SETTINGS_INCOMPLETE where the catalogue to be superseded is no such one */
  async #assertSupersedable(row: IntakeRow): Promise<void> {
    const { supersedes, kind } = storedCheck(row).filled;
    if (!supersedes) return;
    // The kind may be a guess; whether it fits is certain only once the table is read, and asked again then.
    if (kind === undefined || (await this.intakes.supersedable(supersedes, row.surveyId, kind))) return;
    const detail = `The survey has no catalogue of kind "${kind}" in use with the id ${supersedes}.`;
    throw new AppError('SETTINGS_INCOMPLETE', detail, [{ pointer: '/supersedes', detail }]);
  }

  /** Reads the whole table; what is shown of the settings is as the person wrote them. */
  async #inspect(
    surveyId: string,
    file: Pick<IntakeRow, 'fileKey' | 'fileName' | 'companions'>,
    settings: IntakeSettings,
  ): Promise<Inspection> {
    const inspection = await this.worker.inspect({
      ...storedFiles(this.files, file),
      settings: await this.#complete(surveyId, settings),
    });
    if (settings.footprint?.type === 'cones') inspection.filled.footprint = settings.footprint;
    return inspection;
  }

  /** Settings with what the survey knows: cones without centres lie around its detections as they are now. */
  async #complete(surveyId: string, settings: IntakeSettings): Promise<IntakeSettings> {
    const { type, value } = settings.footprint ?? {};
    if (type !== 'cones' || typeof value !== 'object' || value === null || 'centres' in value) return settings;
    const centres = await this.intakes.detectionPlaces(surveyId);
    return { ...settings, footprint: { type, value: { ...value, centres } } };
  }

  async #row(user: SignedInUser, id: string, need: 'read' | 'lead'): Promise<IntakeRow> {
    const row = await this.intakes.find(id);
    if (!row || row.state === 'discarded') throw new AppError('NOT_FOUND', 'There is no such upload.');
    await this.access.survey(user, row.surveyId, need);
    return row;
  }
}

/** What carries over to another table: how it is read, not what it is called or where it has looked. */
function remembered(earlier: IntakeRow): IntakeSettings {
  const {
    name: _name,
    table: _table,
    footprint: _footprint,
    reference: _reference,
    acceptTruncated: _truncated,
    mergeDuplicates: _merge,
    supersedes: _supersedes,
    ...settings
  } = storedCheck(earlier).filled;
  return settings;
}

/** A position that is simply not said yet is a question, not a fault. */
const isOpenPosition = (pointer: string, { columns = {} }: IntakeSettings): boolean =>
  (pointer === '/columns/ra' && columns.ra == null) || (pointer === '/columns/dec' && columns.dec == null);

function assertStaged({ state }: Pick<IntakeRow, 'state'>): void {
  if (state === 'publishing') throw new AppError('NOT_READY', 'The table is being published; wait for that to end.');
  if (state === 'published')
    throw new AppError('CONFLICT', 'The table is published already; remove its catalogue first.');
}

/** @throws {AppError} SETTINGS_INCOMPLETE with every open question, or NOTHING_TO_PUBLISH */
function assertReady(row: IntakeRow): void {
  const { faults, questions, usable, sidelined, leftOut } = storedCheck(row);
  const open = questions.filter(
    ({ level, pointer }) => level === 'ask' && !faults.some((fault) => fault.pointer === pointer),
  );
  const errors = [...faults, ...open.map(({ pointer, text }) => ({ pointer, detail: text }))];
  if (errors.length) throw new AppError('SETTINGS_INCOMPLETE', errors.map(({ detail }) => detail).join(' '), errors);
  if (usable > 0) return;
  const why =
    row.rows === 0
      ? 'The table has no rows.'
      : `Of ${row.rows} rows ${sidelined} have no usable position and ${leftOut} are left out by the settings.`;
  throw new AppError('NOTHING_TO_PUBLISH', why);
}
