import { readFileSync } from 'node:fs';

/**
 * When a process began, in the kernel's own count, so that a process id used again is not mistaken for the old one.
 * Undefined where there is no such process; empty where the system does not tell.
 */
export function processMark(pid: number): string | undefined {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ESRCH') return undefined;
  }
  try {
    // Field 22 of the stat line, counted from behind the name, which may hold blanks and brackets.
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    // A zombie holds nothing any more.
    return fields[0] === 'Z' || fields[0] === 'X' ? undefined : (fields[19] ?? '');
  } catch {
    return '';
  }
}
