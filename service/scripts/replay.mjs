// npm run replay -- edition.zip: repeats an edition from its inputs and says whether it comes out the same.
import { runBuilt } from './run-built.mjs';

await runBuilt('replay.js');
