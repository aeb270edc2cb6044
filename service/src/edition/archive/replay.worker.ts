import { parentPort, workerData } from 'node:worker_threads';
import type { ReplayResult } from '@eremite/shared/contracts/edition';
import { ArchiveError } from './archive-error.ts';
import { replay } from './replay.ts';

/** From the thread: how far it is, and one answer at the end. */
export type ReplayMessage =
  | { kind: 'progress'; fraction: number; message: string }
  | { kind: 'done'; result: ReplayResult }
  | { kind: 'refused'; message: string };

// Scoring keeps a thread busy for seconds to minutes; here it does so without keeping requests waiting.
const port = parentPort!;
const send = (message: ReplayMessage): void => port.postMessage(message);
try {
  const { path } = workerData as { path: string };
  const result = await replay(path, (fraction, message) => send({ kind: 'progress', fraction, message }));
  send({ kind: 'done', result });
} catch (error) {
  if (!(error instanceof ArchiveError)) throw error;
  send({ kind: 'refused', message: error.message });
}
