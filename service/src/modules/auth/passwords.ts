import { Injectable } from '@nestjs/common';
import argon2 from 'argon2';

// Source: OWASP password storage, Argon2id with 19 MiB, 2 passes, 1 lane (from memory).
const OPTIONS = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

@Injectable()
export class Passwords {
  /** Compared with when there is no account, so that the answer takes as long as with one. */
  readonly #nobody = argon2.hash('no account has this password', OPTIONS);

  hash(password: string): Promise<string> {
    return argon2.hash(password, OPTIONS);
  }

  /** @param hash of the account, or undefined where there is none: then false, after the same work */
  async fits(hash: string | undefined, password: string): Promise<boolean> {
    const fits = await argon2.verify(hash ?? (await this.#nobody), password);
    return hash !== undefined && fits;
  }
}
