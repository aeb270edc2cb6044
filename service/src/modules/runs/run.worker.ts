import { once } from 'node:events';
import { parentPort, workerData } from 'node:worker_threads';
import { packCandidates, packNeighbours } from '../../scoring/evidence.ts';
import { runEngine } from '../../scoring/run-engine.ts';
import type { ScoredItem } from '../../scoring/scored-detection.ts';
import { unpackInput } from './packed-input.ts';
import type { RunMessage, RunTask, StoredVerdict } from './run-messages.ts';
import { failureOf } from './thread-failure.ts';

// Scoring keeps a thread busy for seconds to minutes; here it does so without keeping requests waiting.
const port = parentPort!;
const { input } = workerData as RunTask;
const send = (message: RunMessage, transfer: ArrayBuffer[] = []): void => port.postMessage(message, transfer);
const totals = { candidates: 0, neighbours: 0 };

async function run(): Promise<void> {
  const { engine, notes, control } = await runEngine(
    unpackInput(input),
    async (scored, { detections }) => {
      const verdicts = scored.map((one): StoredVerdict => {
        const detection = detections[one.position]!;
        totals.candidates += one.candidates.length;
        totals.neighbours += one.neighbours.length;
        return {
          position: one.position,
          catalogueId: one.catalogueId,
          row: one.row,
          facts: factsOf(one.item),
          item: JSON.stringify(one.item),
          detail: JSON.stringify(one.detail()),
          candidates: packCandidates(one.candidates, detection),
          neighbours: packNeighbours(one.neighbours, detection),
        };
      });
      const taken = once(port, 'message');
      send(
        { kind: 'verdicts', verdicts },
        verdicts.flatMap((one) => [one.candidates.buffer, one.neighbours.buffer] as ArrayBuffer[]),
      );
      await taken;
    },
    { onProgress: (fraction, message) => send({ kind: 'progress', fraction, message }) },
  );
  send({ kind: 'done', notes, control, totals, learnt: engine.learnt });
}

function factsOf(item: ScoredItem): StoredVerdict['facts'] {
  const { name, raDeg, decDeg, velocityKms, distanceMpc, logHiMass, starlight, surroundings } = item;
  const { pNone, pMissed, pSpurious, power, pAlone } = item;
  const place = { name, raDeg, decDeg, velocityKms, distanceMpc, logHiMass };
  return { ...place, starlight, pNone, pMissed, pSpurious, power, surroundings, pAlone };
}

run()
  .catch((error: unknown) => send({ kind: 'failed', ...failureOf(error) }))
  .finally(() => port.close());
