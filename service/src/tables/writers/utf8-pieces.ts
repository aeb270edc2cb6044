const PIECE_CHARACTERS = 64 * 1024;

/** Joins short texts into UTF-8 pieces worth sending. */
export async function* utf8Pieces(texts: AsyncIterable<string>): AsyncIterable<Uint8Array> {
  let held: string[] = [];
  let length = 0;
  for await (const text of texts) {
    held.push(text);
    length += text.length;
    if (length < PIECE_CHARACTERS) continue;
    yield Buffer.from(held.join(''));
    held = [];
    length = 0;
  }
  if (length > 0) yield Buffer.from(held.join(''));
}
