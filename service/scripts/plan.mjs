// npm run plan -- plan.json --out folder: the whole job without a server.
import { runBuilt } from './run-built.mjs';

await runBuilt('plan.js');
