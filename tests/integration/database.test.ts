import { users } from '@eremite/schema';
import { BulkStore } from '@eremite/service/database/bulk.ts';
import { isUniqueViolation } from '@eremite/service/database/pg-error.ts';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApp, type TestApp } from '../support/start-app.ts';

const COLUMNS = [
  { name: 'id', type: 'uuid' },
  { name: 'small', type: 'int4' },
  { name: 'large', type: 'int8' },
  { name: 'number', type: 'float8' },
  { name: 'words', type: 'text' },
  { name: 'bytes', type: 'bytea' },
  { name: 'facts', type: 'jsonb' },
] as const;
const TYPES = COLUMNS.map((column) => column.type);

describe('the built-in database', () => {
  let app: TestApp;
  let bulk: BulkStore;
  beforeAll(async () => {
    app = await startApp();
    bulk = app.get<BulkStore>(BulkStore);
    await app.db.execute(
      sql`create table bulk_try (id uuid, small int4, large int8, number float8, words text, bytes bytea, facts jsonb)`,
    );
  });
  afterAll(() => app.close());

  it('gives back in bulk what was put in, value for value', async () => {
    const uuid = '01234567-89ab-cdef-0123-456789abcdef';
    const rows = [
      [uuid, 1, 9_007_199_254_740_991, 0.1, "it's a text; ünïcode 🌌", Uint8Array.of(0, 255, 7), { a: [1, null, 'x'] }],
      [uuid, -2_147_483_648, -1, -1.5e300, '', new Uint8Array(0), []],
      [null, null, null, null, null, null, null],
      [uuid, 0, 0, Number.NaN, 'a\u0000b', Uint8Array.of(1), 'text'],
    ];
    expect(await bulk.copyInto('bulk_try', COLUMNS, [rows])).toBe(4);
    const read: unknown[][] = [];
    for await (const batch of bulk.read('select * from bulk_try', [], TYPES)) read.push(...batch);
    expect(read.slice(0, 3)).toEqual(rows.slice(0, 3));
    expect(read[3]).toEqual([uuid, 0, 0, null, 'ab', Uint8Array.of(1), 'text']);
  });

  it('cuts large amounts into pieces and loses none', async () => {
    await app.db.execute(sql`delete from bulk_try`);
    const blob = new Uint8Array(200_000).fill(9);
    function* batches() {
      for (let i = 0; i < 100; i += 1)
        yield [['01234567-89ab-cdef-0123-456789abcdef', i, i, i / 3, `row ${i}`, blob, {}]];
    }
    expect(await bulk.copyInto('bulk_try', COLUMNS, batches())).toBe(100);
    const seen: number[] = [];
    const select = 'select small, bytes from bulk_try where small = any($1::int4[]) and words <> $2 order by small';
    const wanted = [3, 50, 99];
    for await (const batch of bulk.read(select, [wanted, "o'row"], ['int4', 'bytea'])) {
      for (const [small, bytes] of batch) {
        seen.push(small as number);
        expect((bytes as Uint8Array).byteOffset).toBe(0);
        expect(bytes).toHaveLength(blob.length);
      }
    }
    expect(seen).toEqual(wanted);
  });

  it('is still usable after a copy that failed', async () => {
    const bad = bulk.copyInto('bulk_try', [{ name: 'no_such_column', type: 'int4' }], [[[1]]]);
    await expect(bad).rejects.toThrow('no_such_column');
    await expect(bulk.copyInto('bulk_try', [COLUMNS[1]], [[[1]]])).resolves.toBe(1);
  });

  it('undoes a transaction that fails', async () => {
    const failing = app.db.transaction(async (tx) => {
      await tx.insert(users).values({ email: 'tx@example.org', name: 'x', passwordHash: 'x' });
      throw new Error('changed my mind');
    });
    await expect(failing).rejects.toThrow('changed my mind');
    expect(await app.db.$count(users, sql`email = 'tx@example.org'`)).toBe(0);
  });

  it('refuses the outer handle inside a transaction instead of waiting for ever', async () => {
    const wrong = app.db.transaction(() => app.db.select().from(users));
    await expect(wrong).rejects.toMatchObject({ cause: { message: expect.stringContaining('its own handle') } });
    expect(await app.db.execute(sql`select 1`)).toBeTruthy();
  });

  it('tells what kind of violation an error is', async () => {
    const row = { email: 'twice@example.org', name: 'x', passwordHash: 'x' };
    await app.db.insert(users).values(row);
    const error: unknown = await app.db
      .insert(users)
      .values(row)
      .catch((reason: unknown) => reason);
    expect(isUniqueViolation(error)).toBe(true);
  });

  it('serves others while it works', async () => {
    const slow = app.db.execute(sql`select count(*) from generate_series(1, 3000000)`);
    let longest = 0;
    let last = performance.now();
    const timer = setInterval(() => {
      longest = Math.max(longest, performance.now() - last);
      last = performance.now();
    }, 5);
    const started = performance.now();
    await slow;
    clearInterval(timer);
    // The event loop must not stand still for as long as the query takes, even on a busy machine.
    expect(longest).toBeLessThan(Math.max(200, (performance.now() - started) * 0.8));
  });
});
