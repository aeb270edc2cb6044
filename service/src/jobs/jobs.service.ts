import { EventEmitter } from 'node:events';
import type { Job } from '@eremite/shared/contracts/job';
import {
  Inject,
  Injectable,
  Logger,
  type OnApplicationBootstrap,
  type BeforeApplicationShutdown,
} from '@nestjs/common';
import { AccessService } from '../common/access.ts';
import { AppError } from '../common/app-error.ts';
import type { SignedInUser } from '../common/signed-in-user.ts';
import { ENV, type Env } from '../config/env.ts';
import type { Database } from '../database/database.ts';
import type { JobHandler } from './job-handler.ts';
import { JobQueue } from './job-queue.ts';
import { JobRun } from './job-run.ts';
import { type JobRow, JobsRepository } from './jobs.repository.ts';
import { toJob } from './to-job.ts';

/** Seconds without a sign of life after which a running job counts as abandoned. */
const ABANDONED_AFTER = 30;
const MOST_ATTEMPTS = 3;

/** Long work: a row says how it stands, the queue says who does it. */
@Injectable()
export class JobsService implements OnApplicationBootstrap, BeforeApplicationShutdown {
  readonly #log = new Logger(JobsService.name);
  readonly #handlers = new Map<string, JobHandler>();
  readonly #running = new Map<string, JobRun>();
  readonly #changes = new EventEmitter().setMaxListeners(0);
  #sweep: NodeJS.Timeout | undefined;
  #stopping = false;

  constructor(
    private readonly jobs: JobsRepository,
    private readonly queue: JobQueue,
    private readonly access: AccessService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  /** Called by modules while they start. */
  register<Payload, Result>(handler: JobHandler<Payload, Result>): void {
    if (this.#handlers.has(handler.kind)) throw new Error(`a handler for "${handler.kind}" is registered already`);
    this.#handlers.set(handler.kind, handler as JobHandler);
  }

  async onApplicationBootstrap(): Promise<void> {
    await this.queue.start();
    await this.takeUp();
    await this.queue.work(this.env.jobWorkers, (id) => this.#run(id));
    if (this.env.databaseUrl) {
      this.#sweep = setInterval(() => void this.takeUp().catch(this.#warn), ABANDONED_AFTER * 1000);
      this.#sweep.unref();
    }
  }

  /** Running jobs are told to stop and put back, so that the next start takes them up. */
  async beforeApplicationShutdown(): Promise<void> {
    this.#stopping = true;
    clearInterval(this.#sweep);
    const running = [...this.#running.values()];
    for (const run of running) run.abort('stopping');
    await this.queue.stop().catch(this.#warn);
    await Promise.race([
      Promise.allSettled(running.map((run) => run.ended)),
      new Promise((r) => setTimeout(r, 8000).unref()),
    ]);
  }

  /**
   * Puts work on the queue.
   *
   * @param payload JSON; what the handler gets
   * @returns id of the job
   */
  async enqueue(kind: string, payload: object, of: { surveyId?: string; userId?: string }): Promise<string> {
    const id = await this.add(kind, payload, of);
    await this.release(id);
    return id;
  }

  /** First half of {@link enqueue}, inside a transaction; {@link release} it once that is committed. */
  async add(kind: string, payload: object, of: { surveyId?: string; userId?: string }, db?: Database): Promise<string> {
    if (!this.#handlers.has(kind)) throw new Error(`no handler is registered for "${kind}"`);
    const row = await this.jobs.insert({ kind, payload, surveyId: of.surveyId, createdBy: of.userId }, db);
    return row.id;
  }

  async release(id: string): Promise<void> {
    await this.queue.send(id);
    this.#changes.emit(id);
  }

  /** The job as its readers see it: members of its survey's team, or who began it. */
  async get(user: SignedInUser, id: string): Promise<Job> {
    return toJob(await this.#visible(user, id, 'read'));
  }

  async cancel(user: SignedInUser, id: string): Promise<Job> {
    await this.#visible(user, id, 'lead');
    const row = await this.jobs.requestCancel(id);
    if (row?.state === 'queued') await this.#end(row, 'cancelled', 'cancelled before it began');
    this.#running.get(id)?.abort('cancelled');
    this.#changes.emit(id);
    return toJob((await this.jobs.get(id))!);
  }

  /** Calls back on every change until the returned function is called. */
  onChange(id: string, listener: () => void): () => void {
    this.#changes.on(id, listener);
    return () => this.#changes.off(id, listener);
  }

  /** Waits for the end: for the demo and for tests. */
  async settled(id: string): Promise<Job> {
    for (;;) {
      const row = await this.jobs.get(id);
      if (!row) throw new AppError('NOT_FOUND', 'There is no such job.');
      if (row.finishedAt) return toJob(row);
      await new Promise<void>((resolve) => {
        const done = () => {
          clearTimeout(timer);
          stop();
          resolve();
        };
        const stop = this.onChange(id, done);
        const timer = setTimeout(done, 500);
      });
    }
  }

  async #visible(user: SignedInUser, id: string, need: 'read' | 'lead'): Promise<JobRow> {
    const row = await this.jobs.get(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such job.');
    if (row.createdBy === user.id) {
      // Who began it keeps sight of it only as long as the survey is theirs to see.
      if (row.surveyId) await this.access.survey(user, row.surveyId, 'read');
      return row;
    }
    if (!row.surveyId) throw new AppError('NOT_FOUND', 'There is no such job.');
    await this.access.survey(user, row.surveyId, need);
    return row;
  }

  async #run(id: string): Promise<void> {
    if (this.#stopping) return;
    const row = await this.jobs.start(id);
    if (!row) return;
    const handler = this.#handlers.get(row.kind);
    if (!handler) return this.#end(row, 'failed', `this version knows no work of the kind "${row.kind}"`);
    const run = new JobRun(row, this.jobs, () => this.#changes.emit(id));
    this.#running.set(id, run);
    try {
      const result = await run.begin(handler);
      await this.jobs.finish(id, { state: 'done', result });
    } catch (error) {
      await this.#unfinished(row, run, error);
    } finally {
      this.#running.delete(id);
      run.close();
      this.#changes.emit(id);
    }
  }

  async #unfinished(row: JobRow, run: JobRun, error: unknown): Promise<void> {
    if (run.abortedFor === 'cancelled') return this.#end(row, 'cancelled', 'cancelled');
    if (run.abortedFor === 'stopping') {
      await this.#handlers.get(row.kind)?.recover?.(row.payload, { id: row.id });
      return this.jobs.putBack(row.id);
    }
    this.#log.error({ jobId: row.id, kind: row.kind, err: error }, 'job failed');
    const known = error instanceof AppError;
    await this.#end(
      row,
      'failed',
      known ? (error.detail ?? error.title) : 'Something went wrong here.',
      known ? error.title : undefined,
    );
  }

  async #end(row: JobRow, state: 'failed' | 'cancelled', detail: string, title?: string): Promise<void> {
    const error = { title: title ?? (state === 'failed' ? 'The job failed' : 'The job was cancelled'), detail };
    await this.jobs.finish(row.id, { state, error });
    await this.#handlers.get(row.kind)?.ended?.(row.payload, { id: row.id, state, error: detail });
    this.#changes.emit(row.id);
  }

  /**
   * Takes up what a process that died left behind: puts it back or ends it. The built-in database belongs to one
   * process, so there whatever is not running here is nobody's.
   */
  async takeUp(): Promise<void> {
    for (const row of await this.jobs.abandoned(this.env.databaseUrl ? ABANDONED_AFTER : 0)) {
      const handler = this.#handlers.get(row.kind);
      if (this.#running.has(row.id)) continue;
      await handler?.recover?.(row.payload, { id: row.id });
      if (row.cancelRequestedAt) await this.#end(row, 'cancelled', 'cancelled');
      else if (!handler?.recover)
        await this.#end(row, 'failed', 'The service stopped in the middle of it; start it again.');
      else if (row.attempts >= MOST_ATTEMPTS)
        await this.#end(row, 'failed', `It did not survive ${row.attempts} attempts.`);
      else await this.jobs.putBack(row.id);
    }
    // The queue forgets an entry whose process died; a second entry does no harm, since only one can start the job.
    for (const row of await this.jobs.queued()) await this.queue.send(row.id);
  }

  readonly #warn = (error: unknown): void => this.#log.warn(error instanceof Error ? error.message : String(error));
}
