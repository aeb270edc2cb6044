import { createHash } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, readFile } from 'node:fs/promises';
import { dirname, join, normalize, sep } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { type Entry, openPromise, type ZipFile } from 'yauzl';
import { ArchiveError } from './archive-error.ts';
import { MANIFEST, manifestSchema, type ReadManifest } from './manifest.ts';

/** Files of an archive beyond this are not ours. */
const MOST_FILES = 10_000;

/**
 * Unpacks an archive into a folder and holds every file to the hash the manifest gives it.
 *
 * @throws {ArchiveError} naming the file that is missing, was changed, or does not belong there
 */
export async function readArchive(path: string, folder: string): Promise<ReadManifest> {
  const there = await unpack(path, folder);
  if (!there.has(MANIFEST)) throw new ArchiveError(`${MANIFEST} is missing: this is not the archive of an edition.`);
  const manifest = await readManifest(join(folder, MANIFEST));
  for (const { path: name, bytes, sha256 } of manifest.files) {
    if (!there.delete(name)) throw new ArchiveError(`${name} is missing from the archive.`);
    const found = await hashOf(join(folder, name));
    if (found.sha256 !== sha256) {
      const size = found.bytes === bytes ? `${bytes} bytes as before` : `${found.bytes} bytes, it had ${bytes}`;
      throw new ArchiveError(
        `${name} was changed since the edition was frozen (${size}; sha256 ${found.sha256}, not ${sha256}).`,
      );
    }
  }
  there.delete(MANIFEST);
  const [stranger] = there;
  if (stranger !== undefined)
    throw new ArchiveError(`${stranger} was put into the archive since the edition was frozen.`);
  return manifest;
}

async function readManifest(path: string): Promise<ReadManifest> {
  let json: unknown;
  try {
    json = JSON.parse(await readFile(path, 'utf8'));
  } catch (error) {
    throw new ArchiveError(`${MANIFEST} is not valid JSON (${(error as Error).message}).`);
  }
  const read = manifestSchema.safeParse(json);
  if (read.success) return read.data;
  const issue = read.error.issues[0]!;
  throw new ArchiveError(`${MANIFEST} does not fit: /${issue.path.map(String).join('/')}: ${issue.message}.`);
}

async function unpack(path: string, folder: string): Promise<Set<string>> {
  const zip = await openPromise(path).catch((error: unknown) => {
    throw new ArchiveError(`The file cannot be opened as a zip archive (${(error as Error).message}).`);
  });
  const names = new Set<string>();
  try {
    for await (const entry of zip.eachEntry()) {
      const name = entry.fileName;
      if (name.endsWith('/')) continue;
      const place = normalize(join(folder, name));
      if (!place.startsWith(folder + sep)) throw new ArchiveError(`${name} would lie outside the archive's folder.`);
      if (names.has(name)) throw new ArchiveError(`${name} is in the archive twice.`);
      if (names.add(name).size > MOST_FILES) throw new ArchiveError(`The archive has more than ${MOST_FILES} files.`);
      await mkdir(dirname(place), { recursive: true });
      await extract(zip, entry, place);
    }
  } catch (error) {
    if (error instanceof ArchiveError) throw error;
    throw new ArchiveError(`The archive is damaged (${(error as Error).message}).`);
  } finally {
    zip.close();
  }
  return names;
}

async function extract(zip: ZipFile, entry: Entry, place: string): Promise<void> {
  try {
    await pipeline(await zip.openReadStreamPromise(entry), createWriteStream(place, { flags: 'wx' }));
  } catch (error) {
    throw new ArchiveError(`${entry.fileName} is damaged in the archive (${(error as Error).message}).`);
  }
}

export async function hashOf(path: string): Promise<{ bytes: number; sha256: string }> {
  const hash = createHash('sha256');
  let bytes = 0;
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    hash.update(chunk as Buffer);
    bytes += (chunk as Buffer).length;
  }
  return { bytes, sha256: hash.digest('hex') };
}
