import { createHash } from 'node:crypto';
import { Readable, Transform } from 'node:stream';
import { ZipFile } from 'yazl';
import { type ArchivedFile, MANIFEST, type Manifest } from './manifest.ts';

/** A file to be put into the archive; opened when its turn comes. */
export interface ArchiveEntry {
  path: string;
  open(): AsyncIterable<Uint8Array> | Promise<AsyncIterable<Uint8Array>>;
}

/**
 * Writes an edition's archive as a zip file, piece by piece: nothing is held but the directory. The manifest comes last,
 * since it has the hashes of all files before it. The same content gives the same bytes.
 *
 * @param mtime of all files: when the edition was frozen
 * @param manifest without its list of files
 * @param onFile called as each file is done
 */
export function writeArchive(
  manifest: Omit<Manifest, 'files'>,
  entries: readonly ArchiveEntry[],
  mtime: Date,
  onFile: (file: ArchivedFile) => void = () => undefined,
): Readable {
  const zip = new ZipFile();
  const output = zip.outputStream as unknown as Readable;
  const files: ArchivedFile[] = [];
  zip.on('error', (error) => output.destroy(error as Error));
  for (const { path, open } of entries) {
    // Only lazily opened streams keep memory and open files few.
    zip.addReadStreamLazy(path, { mtime }, (callback) => {
      Promise.resolve(open())
        .then((content) => {
          const source = Readable.from(content, { objectMode: false });
          const counted = counting(path, (file) => {
            files.push(file);
            onFile(file);
          });
          source.on('error', (error) => counted.destroy(error));
          counted.on('error', (error) => output.destroy(error));
          callback(null, source.pipe(counted));
        })
        .catch((error: unknown) => output.destroy(error as Error));
    });
  }
  zip.addReadStreamLazy(MANIFEST, { mtime }, (callback) => {
    const whole: Manifest = { ...manifest, files };
    callback(null, Readable.from([Buffer.from(`${JSON.stringify(whole, null, 2)}\n`)], { objectMode: false }));
  });
  zip.end();
  return output;
}

/** Passes bytes on and tells their hash at the end. */
function counting(path: string, done: (file: ArchivedFile) => void): Transform {
  const hash = createHash('sha256');
  let bytes = 0;
  return new Transform({
    transform(chunk: Buffer, _, next) {
      hash.update(chunk);
      bytes += chunk.length;
      next(null, chunk);
    },
    flush(next) {
      done({ path, bytes, sha256: hash.digest('hex') });
      next();
    },
  });
}
