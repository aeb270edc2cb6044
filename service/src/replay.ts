import { replayCommand } from './edition/archive/replay-command.ts';

process.exitCode = await replayCommand(
  process.argv.slice(2),
  (line) => process.stderr.write(`${line}\n`),
  (line) => process.stdout.write(`${line}\n`),
);
