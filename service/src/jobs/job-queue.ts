import PgBoss from 'pg-boss';
import { Inject, Injectable, Logger } from '@nestjs/common';
import { SQL_CLIENT, type SqlClient } from '../database/sql-client.ts';

const QUEUE = 'eremite-work';
const HOUR = 3600;
/** A process is told of its own entries at once; for those of other processes it looks this often. */
const POLL_SECONDS = 1;

/** The queue on the same database: hands job ids to whichever process is free. */
@Injectable()
export class JobQueue {
  readonly #log = new Logger(JobQueue.name);
  readonly #boss: PgBoss;
  #workers: string[] = [];

  constructor(@Inject(SQL_CLIENT) client: SqlClient) {
    this.#boss = new PgBoss({
      db: { executeSql: (text, values) => client.executeSql(text, values) },
      schedule: false,
      maintenanceIntervalSeconds: 600,
      deleteAfterDays: 2,
    });
    this.#boss.on('error', (error) => this.#log.error(error.message));
  }

  async start(): Promise<void> {
    await this.#boss.start();
    // Trying again is decided by the jobs table, which knows about heartbeats.
    await this.#boss.createQueue(QUEUE, { name: QUEUE, policy: 'standard', retryLimit: 0, expireInSeconds: 23 * HOUR });
  }

  async work(count: number, run: (jobId: string) => Promise<void>): Promise<void> {
    for (let i = 0; i < count; i += 1) {
      const worker = await this.#boss.work<{ jobId: string }>(
        QUEUE,
        { pollingIntervalSeconds: POLL_SECONDS },
        async (tasks) => {
          for (const task of tasks) await run(task.data.jobId);
        },
      );
      this.#workers.push(worker);
    }
  }

  async send(jobId: string): Promise<void> {
    await this.#boss.send(QUEUE, { jobId });
    for (const worker of this.#workers) this.#boss.notifyWorker(worker);
  }

  /** Takes no more work in hand; the running work is the caller's to end. */
  async stop(): Promise<void> {
    await this.#boss.stop({ graceful: false, wait: true, close: false, timeout: 1000 });
  }
}
