import { Global, Inject, Module, type OnApplicationShutdown } from '@nestjs/common';
import { ENV, type Env } from '../config/env.ts';
import { BulkStore } from './bulk.ts';
import { DATABASE } from './database.ts';
import { openDatabase, type OpenDatabase } from './open-database.ts';
import { SQL_CLIENT } from './sql-client.ts';

/** Injection token of the opened database as a whole. */
export const OPEN_DATABASE = Symbol('OPEN_DATABASE');

@Global()
@Module({
  providers: [
    { provide: OPEN_DATABASE, inject: [ENV], useFactory: (env: Env) => openDatabase(env) },
    { provide: DATABASE, inject: [OPEN_DATABASE], useFactory: (open: OpenDatabase) => open.db },
    { provide: BulkStore, inject: [OPEN_DATABASE], useFactory: (open: OpenDatabase) => open.bulk },
    { provide: SQL_CLIENT, inject: [OPEN_DATABASE], useFactory: (open: OpenDatabase) => open.sql },
  ],
  exports: [OPEN_DATABASE, DATABASE, BulkStore, SQL_CLIENT],
})
export class DatabaseModule implements OnApplicationShutdown {
  constructor(@Inject(OPEN_DATABASE) private readonly open: OpenDatabase) {}

  /** Last of all: whoever still writes ends in an earlier step. */
  async onApplicationShutdown(): Promise<void> {
    await this.open.close();
  }
}
