/** An archive that is not what was written, or cannot be repeated: in words for whoever asked. */
export class ArchiveError extends Error {
  override readonly name = 'ArchiveError';
}
