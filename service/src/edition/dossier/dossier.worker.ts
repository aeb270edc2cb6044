import { parentPort, workerData } from 'node:worker_threads';
import type { DossierInput } from './dossier-input.ts';
import { writeDossier } from './write-dossier.ts';

// Laying pages out keeps a thread busy for a tenth of a second each; here it does so without keeping requests waiting.
const bytes = await writeDossier(workerData as DossierInput);
// A copy of its own memory, so that it can be handed over without copying again.
const own = new Uint8Array(bytes);
parentPort!.postMessage(own, [own.buffer]);
