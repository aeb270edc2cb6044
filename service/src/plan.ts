import { workerUrl } from './common/worker-url.ts';
import { readThreads } from './config/env.ts';
import { planCommand } from './plan/command.ts';

const say = (line: string): void => void process.stderr.write(`${line}\n`);
process.exitCode = await planCommand(process.argv.slice(2), say, { worker: workerUrl('plan'), threads: readThreads() });
