import { sql } from 'drizzle-orm';
import { boolean, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { at, createdAt, id } from '../columns.ts';

export const users = pgTable('users', {
  id: id(),
  /** Lower case. */
  email: text('email').notNull().unique(),
  name: text('name').notNull(),
  passwordHash: text('password_hash').notNull(),
  isAdministrator: boolean('is_administrator').notNull().default(false),
  disabledAt: at('disabled_at'),
  createdAt: createdAt(),
});

/** A signed-in browser; the refresh token rotates, and one used twice ends the session. */
export const sessions = pgTable('sessions', {
  id: id(),
  userId: uuid('user_id')
    .notNull()
    .references(() => users.id, { onDelete: 'cascade' }),
  refreshHash: text('refresh_hash').notNull(),
  expiresAt: at('expires_at').notNull(),
  endedAt: at('ended_at'),
  createdAt: createdAt(),
});

export const personalTokens = pgTable('personal_tokens', {
  id: id(),
  userId: uuid('user_id')
    .notNull()
    .references(() => users.id, { onDelete: 'cascade' }),
  name: text('name').notNull(),
  tokenHash: text('token_hash').notNull().unique(),
  scope: text('scope').notNull(),
  expiresAt: at('expires_at').notNull(),
  lastUsedAt: at('last_used_at'),
  revokedAt: at('revoked_at'),
  createdAt: createdAt(),
});

export const teams = pgTable('teams', { id: id(), name: text('name').notNull(), createdAt: createdAt() });

export const memberships = pgTable(
  'memberships',
  {
    teamId: uuid('team_id')
      .notNull()
      .references(() => teams.id, { onDelete: 'cascade' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    role: text('role').notNull(),
    createdAt: createdAt(),
  },
  (table) => [primaryKey({ columns: [table.teamId, table.userId] })],
);

export const invitations = pgTable(
  'invitations',
  {
    id: id(),
    teamId: uuid('team_id')
      .notNull()
      .references(() => teams.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    role: text('role').notNull(),
    tokenHash: text('token_hash').notNull().unique(),
    invitedBy: uuid('invited_by')
      .notNull()
      .references(() => users.id),
    expiresAt: at('expires_at').notNull(),
    acceptedAt: at('accepted_at'),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('invitations_open')
      .on(table.teamId, table.email)
      .where(sql`accepted_at is null`),
  ],
);

/** Every mail the service sends; `kept` where no mail server is configured. */
export const mails = pgTable('mails', {
  id: id(),
  /** Whose leads may read it; null for mails that are no team's. */
  teamId: uuid('team_id').references(() => teams.id, { onDelete: 'cascade' }),
  to: text('to').notNull(),
  subject: text('subject').notNull(),
  text: text('text').notNull(),
  state: text('state').notNull().default('queued'),
  error: text('error'),
  createdAt: createdAt(),
});
