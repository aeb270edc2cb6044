import { bigserial, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { at } from '../columns.ts';
import { users } from './people.ts';
import { surveys } from './surveys.ts';

/** Append only; each hash covers the line and the hash before it. */
export const ledger = pgTable(
  'ledger',
  {
    id: bigserial('id', { mode: 'number' }).primaryKey(),
    surveyId: uuid('survey_id')
      .notNull()
      .references(() => surveys.id),
    number: integer('number').notNull(),
    at: at('at').notNull(),
    actorId: uuid('actor_id').references(() => users.id),
    actor: text('actor').notNull(),
    action: text('action').notNull(),
    subject: text('subject').notNull(),
    note: text('note').notNull().default(''),
    detail: jsonb('detail').notNull().default({}),
    previousHash: text('previous_hash').notNull(),
    hash: text('hash').notNull(),
  },
  (table) => [uniqueIndex('ledger_number').on(table.surveyId, table.number)],
);
