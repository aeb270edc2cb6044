import { customType, timestamp, uuid } from 'drizzle-orm/pg-core';

/** Raw bytes, the same on both drivers. */
export const bytea = customType<{ data: Uint8Array; driverData: Uint8Array }>({ dataType: () => 'bytea' });
export const id = () => uuid('id').primaryKey().defaultRandom();
export const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });
export const createdAt = () => at('created_at').notNull().defaultNow();
