import { parentPort, workerData } from 'node:worker_threads';
import { fileSource } from '../tables/bytes/byte-source.ts';
import { type ReaderLimits, TableError } from '../tables/table.ts';
import { Handovers } from './handovers.ts';
import { inspect } from './inspect.ts';
import type { IntakeFailure, IntakeMessage, IntakeTask } from './intake-messages.ts';
import type { Tile } from '../tiles/tile.ts';
import { tilePiece } from '../tiles/tile-piece.ts';
import { publish } from './publish.ts';
import { SettingsError } from './resolved.ts';

// Reading a table keeps a thread busy for seconds; here it does so without keeping requests waiting. The thread stays
// for the next table, one at a time.
const port = parentPort!;
const send = (message: IntakeMessage, transfer: ArrayBuffer[] = []): void => port.postMessage(message, transfer);
const REPORT_MS = 100;
const limits = workerData as Partial<ReaderLimits>;
const handovers = new Handovers();

async function handOver(message: IntakeMessage, transfer: ArrayBuffer[] = []): Promise<void> {
  await handovers.begin();
  send(message, transfer);
}

async function work(task: IntakeTask): Promise<void> {
  let lastReport = 0;
  const onProgress = (fraction: number, rows: number) => {
    if (Date.now() - lastReport < REPORT_MS) return;
    lastReport = Date.now();
    send({ kind: 'progress', fraction, rows });
  };
  const source = await fileSource(task.path, task.fileName);
  const open = ({ path, fileName }: NonNullable<IntakeTask['readMe']>) => fileSource(path, fileName);
  const options = {
    onProgress,
    limits,
    ...(task.readMe ? { readMe: await open(task.readMe) } : {}),
    parts: await Promise.all((task.parts ?? []).map(open)),
  };
  if (task.what === 'inspect') {
    send({ kind: 'inspected', inspection: await inspect(source, task.settings, options) });
    return;
  }
  const sink = {
    tiles: (tiles: Tile[]) => {
      const piece = tilePiece(task.catalogueId!, tiles);
      return handOver({ kind: 'tiles', piece }, [piece.bytes.buffer]);
    },
    sidelined: (rows: Extract<IntakeMessage, { kind: 'sidelined' }>['rows']) => handOver({ kind: 'sidelined', rows }),
  };
  const published = await publish(source, task.settings, sink, options);
  await handovers.allTaken();
  send({ kind: 'published', published });
}

function failureOf(error: unknown): IntakeFailure {
  if (error instanceof TableError) {
    const { message, mend, line, column, byte, rowsRead } = error;
    const place = Object.entries({ line, column, byte, rowsRead }).filter(([, value]) => value !== undefined);
    return { kind: 'table', message, mend, ...Object.fromEntries(place) };
  }
  if (error instanceof SettingsError) return { kind: 'settings', faults: [...error.faults] };
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  return { kind: 'unexpected', message, ...(stack === undefined ? {} : { stack }) };
}

port.on('message', (message: IntakeTask | 'taken') => {
  if (message === 'taken') return handovers.taken();
  work(message).catch(async (error: unknown) => {
    // The next task must not hear of what this one has handed over.
    await handovers.allTaken();
    send({ kind: 'failed', failure: failureOf(error) });
  });
});
