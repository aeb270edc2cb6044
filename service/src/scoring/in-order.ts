/**
 * Works through a count in units, several side by side, and hands the results over in their order.
 *
 * @param unit largest size of a unit
 * @param ahead most units under way at a time
 * @param start begins a unit
 * @param take gets the result of each unit and the end of it, one at a time; it is waited for, so that work never runs
 *   further ahead of it than `ahead`
 * @throws the first failure of any unit, after which nothing more is begun or taken
 */
export async function inOrder<T>(
  count: number,
  unit: number,
  ahead: number,
  start: (range: { from: number; to: number }) => Promise<T>,
  take: (result: T, to: number) => void | Promise<void>,
): Promise<void> {
  const underWay: { result: Promise<T>; to: number }[] = [];
  let next = 0;
  for (let taken = 0; taken < count;) {
    while (next < count && underWay.length < ahead) {
      const range = { from: next, to: Math.min(count, next + unit) };
      const result = start(range);
      // A unit that fails while another is waited for is not unheard: it is waited for in its turn.
      result.catch(() => undefined);
      underWay.push({ result, to: range.to });
      next = range.to;
    }
    const { result, to } = underWay.shift()!;
    await take(await result, to);
    taken = to;
  }
}
