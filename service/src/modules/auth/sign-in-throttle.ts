import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';

const WINDOW_MS = 10 * 60_000;
/** Failures for one e-mail from one address, and from one address altogether, before it must wait. */
const PER_ACCOUNT = 10;
const PER_ADDRESS = 100;
const MOST_KEYS = 50_000;

/** Slows down guessing: counts failures only, and per address, so that no one can lock another out. */
@Injectable()
export class SignInThrottle {
  readonly #failures = new Map<string, number[]>();

  /** @throws {AppError} TOO_MANY_REQUESTS */
  check(address: string, email: string, now = Date.now()): void {
    const exceeded = this.#count(`${address} ${email}`, now) >= PER_ACCOUNT || this.#count(address, now) >= PER_ADDRESS;
    if (exceeded) throw new AppError('TOO_MANY_REQUESTS', 'Too many failed attempts to sign in; wait ten minutes.');
  }

  failed(address: string, email: string, now = Date.now()): void {
    if (this.#failures.size > MOST_KEYS) this.#failures.clear();
    for (const key of [`${address} ${email}`, address]) {
      const recent = this.#recent(key, now);
      recent.push(now);
      this.#failures.set(key, recent);
    }
  }

  succeeded(address: string, email: string): void {
    this.#failures.delete(`${address} ${email}`);
  }

  #count(key: string, now: number): number {
    return this.#recent(key, now).length;
  }

  #recent(key: string, now: number): number[] {
    return (this.#failures.get(key) ?? []).filter((at) => now - at < WINDOW_MS);
  }
}
