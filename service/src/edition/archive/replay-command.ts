import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import { ArchiveError } from './archive-error.ts';
import { replay } from './replay.ts';

const USAGE = 'usage: npm run replay -- path/to/edition.zip';

/**
 * The replay command: repeats an edition from its archive.
 *
 * @param words arguments after the script's name
 * @param say where progress and faults go
 * @param tell where the result goes
 * @returns exit status: 0 identical, 1 something differs, 2 the archive is not what was frozen or cannot be used
 */
export async function replayCommand(
  words: readonly string[],
  say: (line: string) => void,
  tell: (line: string) => void,
): Promise<number> {
  const [path, ...more] = words;
  if (path === undefined || more.length > 0 || path.startsWith('-')) {
    say(USAGE);
    return 2;
  }
  if (!existsSync(path)) {
    say(`There is no file ${resolve(path)}.`);
    return 2;
  }
  let last = '';
  try {
    const result = await replay(resolve(path), (fraction, message) => {
      if (message === last) return;
      last = message;
      say(`${String(Math.round(100 * fraction)).padStart(3)} % ${message}`);
    });
    tell(result.sentence);
    for (const difference of result.differences) tell(`  ${difference}`);
    return result.identical ? 0 : 1;
  } catch (error) {
    if (!(error instanceof ArchiveError)) throw error;
    say(`Refused: ${error.message}`);
    return 2;
  }
}
