import { Inject, Injectable } from '@nestjs/common';
import { sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

@Injectable()
export class HealthRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  /** Fails when the database does not answer. */
  async ping(db = this.db): Promise<void> {
    await db.execute(sql`select 1`);
  }
}
