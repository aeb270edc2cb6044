/** Query string of the given values, lists joined by commas, empty ones left out; '' or begins with `?`. */
export function searchString(values: Record<string, string | number | readonly string[] | null | undefined>): string {
  const search = new URLSearchParams();
  for (const [key, value] of Object.entries(values)) {
    const text = Array.isArray(value) ? value.join(',') : value;
    if (text !== undefined && text !== null && text !== '') search.set(key, String(text));
  }
  const text = search.toString();
  return text ? `?${text}` : '';
}
