import { planCommand } from './plan/command.ts';

process.exitCode = await planCommand(process.argv.slice(2), (line) => process.stderr.write(`${line}\n`));
