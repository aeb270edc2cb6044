import type { Content } from '../bytes/content.ts';
import { readHead } from '../bytes/content.ts';
import { cellText } from '../columns/cell-text.ts';
import type { ReaderLimits } from '../table.ts';
import { isComment } from './comment-line.ts';
import { type Delimiter, RecordScanner } from './record-scanner.ts';

const PLACES = [0.2, 0.4, 0.6, 0.8, 0.97];
const PLACE_BYTES = 64 * 1024;
const MAX_ROWS = 200;

/**
 * Rows from further on in a file whose places can be reached without reading up to them, so that a column empty or
 * whole at first is not misjudged. Only rows with `width` cells count, since a sample may start inside a quoted cell.
 */
export async function sampleFurther(
  content: Content,
  delimiter: Delimiter,
  limits: ReaderLimits,
  width: number,
): Promise<string[][]> {
  const { size } = content;
  if (content.complete || size === null || width < 2) return [];
  const samples: string[][] = [];
  for (const place of PLACES) {
    const { head } = await readHead(content.stream(Math.floor(size * place)), PLACE_BYTES);
    const scanner = new RecordScanner(delimiter, limits.maxCellLength);
    const last = head.lastIndexOf(10);
    let start = head.indexOf(10) + 1;
    for (let rows = 0; start > 0 && start < last && rows < MAX_ROWS; rows++) {
      const next = scanner.scan(head, start, last + 1, true);
      if (scanner.count === width && !isComment(head, start, last)) {
        samples.push(Array.from({ length: width }, (_, i) => cellText(head, scanner.starts[i]!, scanner.ends[i]!)));
      }
      start = next;
    }
  }
  return samples;
}
