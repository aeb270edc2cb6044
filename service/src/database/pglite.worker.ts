import { readFileSync } from 'node:fs';
import { parentPort, workerData } from 'node:worker_threads';
import { PGlite, type QueryOptions } from '@electric-sql/pglite';
import type { PgliteAnswer, PgliteRequest, PgliteStart } from './pglite-messages.ts';

// PGlite blocks its thread while it works, so it has one of its own and requests are served meanwhile.
const port = parentPort!;
const start = workerData as PgliteStart;
const keep = (value: string): string => value;
const FIELDS = ['code', 'detail', 'hint', 'constraint', 'table', 'column', 'schema', 'severity', 'position', 'where'];

const opening = PGlite.create({
  ...(start.directory !== undefined && { dataDir: start.directory }),
  ...(start.template !== undefined && { loadDataDir: new Blob([readFileSync(start.template)]) }),
});

/** Bytes as the file that PGlite asks for; a real one would copy them three times on the way. */
class GivenBytes extends Blob {
  readonly #bytes: Uint8Array<ArrayBuffer>;

  constructor(bytes: Uint8Array<ArrayBuffer>) {
    super([]);
    this.#bytes = bytes;
  }

  override arrayBuffer(): Promise<ArrayBuffer> {
    const { buffer, byteOffset, length } = this.#bytes;
    const isAll = length === buffer.byteLength;
    return Promise.resolve(isAll ? buffer : buffer.slice(byteOffset, byteOffset + length));
  }
}

async function answer(request: PgliteRequest): Promise<{ value: unknown; transfer?: ArrayBuffer[] }> {
  const db = await opening;
  switch (request.op) {
    case 'query': {
      const parsers: QueryOptions['parsers'] = Object.fromEntries(request.rawTypes.map((type) => [type, keep]));
      const { rows, affectedRows } = await db.query(request.sql, request.params, { rowMode: request.rowMode, parsers });
      return { value: { rows, affectedRows, rowCount: affectedRows } };
    }
    case 'exec': {
      const results = await db.exec(request.sql).catch(async (error: unknown) => {
        // A script that failed after its own `begin` would leave the one session there is in a broken transaction.
        await db.exec('rollback').catch(() => undefined);
        throw error;
      });
      return { value: results.map(({ rows, affectedRows }) => ({ rows, affectedRows })) };
    }
    case 'copyIn': {
      const { affectedRows } = await db.query(request.sql, [], { blob: new GivenBytes(request.bytes) });
      return { value: affectedRows ?? 0 };
    }
    case 'copyOut': {
      const { blob } = await db.query(request.sql);
      const buffer = await blob!.arrayBuffer();
      return { value: buffer, transfer: [buffer] };
    }
    case 'dump': {
      const buffer = await (await db.dumpDataDir('none')).arrayBuffer();
      return { value: buffer, transfer: [buffer] };
    }
    case 'close':
      await db.close();
      return { value: undefined };
  }
}

function toError(id: number, error: unknown): PgliteAnswer {
  const known = error as Error & Record<string, unknown>;
  const fields = Object.fromEntries(
    FIELDS.flatMap((field) => (known[field] === undefined ? [] : [[field, known[field]]])),
  );
  return { id, error: { message: known.message, fields } };
}

port.on('message', ({ id, request }: { id: number; request: PgliteRequest }) => {
  answer(request).then(
    ({ value, transfer }) => {
      port.postMessage({ id, value } satisfies PgliteAnswer, transfer ?? []);
      if (request.op === 'close') port.close();
    },
    (error: unknown) => port.postMessage(toError(id, error)),
  );
});

opening.then(
  () => port.postMessage({ id: 0, value: undefined } satisfies PgliteAnswer),
  (error: unknown) => port.postMessage(toError(0, error)),
);
