import { createHash, randomUUID } from 'node:crypto';
import { mkdir, open, readdir, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { ENV, type Env } from '../../config/env.ts';

export interface SavedFile {
  readonly key: string;
  readonly bytes: number;
  /** Hex. */
  readonly sha256: string;
}

/** Uploaded files on disk under `<data>/files`, named by random keys. */
@Injectable()
export class FilesService implements OnModuleInit {
  readonly #folder: string;

  constructor(@Inject(ENV) private readonly env: Env) {
    this.#folder = join(env.dataDir, 'files');
  }

  /** What a process that died left half written is of no use to anyone. */
  async onModuleInit(): Promise<void> {
    await mkdir(this.#folder, { recursive: true });
    if (this.env.databaseUrl) return; // Another web process may be writing just now.
    const left = (await readdir(this.#folder)).filter((name) => name.endsWith('.part'));
    await Promise.all(left.map((name) => rm(join(this.#folder, name), { force: true })));
  }

  /**
   * Writes a stream to the end, so that the file is there whole or not at all.
   *
   * @param maxBytes more than this is refused
   * @throws {AppError} TOO_LARGE
   */
  async save(stream: Readable, maxBytes = this.env.maxUploadBytes): Promise<SavedFile> {
    const key = randomUUID();
    const part = join(this.#folder, `${key}.part`);
    const hash = createHash('sha256');
    let bytes = 0;
    const file = await open(part, 'wx');
    try {
      try {
        // Destroyed half read, the stream would raise an error of its own, which hid the one thrown here.
        for await (const chunk of stream.iterator({ destroyOnReturn: false }) as AsyncIterable<Buffer>) {
          bytes += chunk.length;
          if (bytes > maxBytes)
            throw new AppError('TOO_LARGE', `This installation accepts files up to ${maxBytes} bytes.`);
          hash.update(chunk);
          await file.write(chunk);
        }
        await file.sync();
      } finally {
        await file.close();
      }
      await rename(part, join(this.#folder, key));
      await this.#syncFolder();
    } catch (error) {
      stream.resume();
      await rm(part, { force: true });
      throw error;
    }
    return { key, bytes, sha256: hash.digest('hex') };
  }

  path(key: string): string {
    if (!/^[0-9a-f-]{36}$/.test(key)) throw new AppError('NOT_FOUND', 'There is no such file.');
    return join(this.#folder, key);
  }

  async remove(key: string): Promise<void> {
    await rm(this.path(key), { force: true });
  }

  /** Count and bytes of all files kept. */
  async usage(): Promise<{ files: number; bytes: number }> {
    const sizes = await Promise.all(
      (await readdir(this.#folder)).map((name) =>
        stat(join(this.#folder, name))
          .then((s) => s.size)
          .catch(() => 0),
      ),
    );
    return { files: sizes.length, bytes: sizes.reduce((sum, size) => sum + size, 0) };
  }

  async #syncFolder(): Promise<void> {
    const folder = await open(this.#folder, 'r');
    try {
      await folder.sync();
    } finally {
      await folder.close();
    }
  }
}
