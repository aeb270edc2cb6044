import { existsSync, statSync } from 'node:fs';
import { resolve } from 'node:path';
import { PlanError, readPlan } from './read-plan.ts';
import { type PlanPlace, runPlan } from './run-plan.ts';

const USAGE = 'usage: npm run plan -- path/to/plan.json --out some/folder';

function readArguments(words: readonly string[]): { plan: string; out: string } {
  const faults: string[] = [];
  let plan: string | undefined;
  let out: string | undefined;
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!;
    if (word === '--out') out = words[++i];
    else if (word.startsWith('--out=')) out = word.slice('--out='.length);
    else if (word.startsWith('-')) faults.push(`Unknown option ${word}.`);
    else if (plan !== undefined) faults.push(`One plan at a time: ${word} is the second.`);
    else plan = word;
  }
  if (plan === undefined) faults.push('No plan file is named.');
  if (!out) faults.push('No folder for the outputs is named.');
  if (faults.length > 0) throw new PlanError([...faults, USAGE]);
  return { plan: plan!, out: out! };
}

/**
 * The plan command.
 *
 * @param words arguments after the script's name
 * @param say where progress and faults go
 * @param place threads that do the work
 * @returns exit status: 0 done, 1 failed, 2 a bad plan (nothing is written)
 */
export async function planCommand(
  words: readonly string[],
  say: (line: string) => void,
  place: PlanPlace,
): Promise<number> {
  try {
    const { plan: path, out } = readArguments(words);
    const folder = resolve(out);
    const read = readPlan(resolve(path));
    if (existsSync(folder) && !statSync(folder).isDirectory()) {
      throw new PlanError([`--out: ${folder} is a file, not a folder.`]);
    }
    let last = 0;
    let lastMessage = '';
    const report = (fraction: number, message: string) => {
      const now = Date.now();
      if (now - last < 1000 && message === lastMessage) return;
      last = now;
      lastMessage = message;
      say(`${String(Math.round(100 * fraction)).padStart(3)} % ${message}`);
    };
    const summary = await runPlan(read, folder, report, place);
    const words_ = Object.entries(summary.counts.starlight).map(([word, count]) => `${count} ${word}`);
    say(`100 % done: ${summary.counts.detections} detections (${words_.join(', ')}) in ${folder}`);
    return 0;
  } catch (error) {
    if (error instanceof PlanError) {
      for (const fault of error.faults) say(fault);
      return 2;
    }
    say(error instanceof Error ? `The plan failed: ${error.message}` : String(error));
    return 1;
  }
}
