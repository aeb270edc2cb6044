/** Numbers or booleans of a JSON array with blanks between, null as NaN; arrays of text and other text stay as they are. */
export function jsonArrayText(cell: string): string {
  if (!cell.startsWith('[')) return cell;
  try {
    const items = (JSON.parse(cell) as unknown[]).flat(Infinity);
    if (items.some((item) => typeof item === 'string')) return cell;
    return items.map((item) => (item === null ? 'NaN' : String(item))).join(' ');
  } catch {
    return cell;
  }
}
