type Result = { value: unknown } | { fault: string };

const numbers = (line: string) =>
  line
    .trim()
    .split(/[\s,;]+/)
    .map(Number);

/** Reads circles or polygons from lines of numbers in degrees; a MOC goes on as it is. Names the line at fault. */
export function parseFootprint(type: 'moc' | 'circles' | 'polygons', text: string): Result {
  if (type === 'moc') return text.trim() ? { value: text.trim() } : { fault: 'The MOC is empty.' };
  const wanted = type === 'circles' ? 3 : 2;
  const groups: number[][][] = [[]];
  for (const [at, line] of text.split('\n').entries()) {
    if (line.trim() === '') {
      if (groups.at(-1)!.length > 0) groups.push([]);
      continue;
    }
    const row = numbers(line);
    if (row.length !== wanted || row.some((value) => !Number.isFinite(value))) {
      return { fault: `Line ${at + 1}: expected ${wanted} numbers, found "${line.trim()}".` };
    }
    groups.at(-1)!.push(row);
  }
  const filled = groups.filter((group) => group.length > 0);
  if (filled.length === 0) return { fault: 'Nothing is given yet.' };
  if (type === 'circles') return { value: filled.flat() };
  if (filled.some((polygon) => polygon.length < 3)) return { fault: 'A polygon needs three corners or more.' };
  return { value: filled };
}
